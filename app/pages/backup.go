package pages

import (
	"fmt"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/storage"
)

// backupDaily makes the day's backup; that it failed is told.
func (f *Frame) backupDaily() {
	if err := f.s.BackupDaily(); err != nil {
		f.tell("No backup could be made today", err.Error()+". The register itself is as it was.")
	}
}

// restoreBackup shows the register's backups, to restore one.
func (f *Frame) restoreBackup() {
	all, err := f.s.Backups()
	switch {
	case err != nil:
		f.report(err)
	case len(all) == 0:
		f.tell("No backup yet", "The program makes one at its start when the last is a day old, and keeps the last ten.")
	default:
		f.newBackups(all).open()
	}
}

// backupsDialog is the dialog of restoreBackup.
type backupsDialog struct {
	*listDialog
	backups []storage.Backup
}

func (f *Frame) newBackups(all []storage.Backup) *backupsDialog {
	var rows listed
	for _, b := range all {
		rows = append(rows, []grid.Cell{{Text: moment(b.At), Bold: true}, {Text: fileSize(b.Size)}, {Text: b.Path, Muted: true}})
	}
	note := "A backup holds the whole register: every asset with its history. The register as it is now is backed up before, so that this can be taken back in the same way."
	return &backupsDialog{newListDialog(f, "Restore a backup", note, []grid.Column{
		{Title: "Made", Width: 185},
		{Title: "Size", Width: 90, Right: true},
		{Title: "File", Width: 300, Fill: true},
	}, rows), all}
}

func (b *backupsDialog) open() {
	b.show(look.Button("Cancel", b.close), look.AccentButton("Restore this backup…", b.restore))
}

func (b *backupsDialog) restore() {
	chosen := b.backups[b.row()]
	b.close()
	f := b.f
	f.confirm("Restore the backup of "+moment(chosen.At)+"?",
		"All assets become what they were then. The register as it is now is backed up first.", "Restore", func() {
			made, err := f.s.RestoreBackup(chosen.Path)
			if err != nil {
				f.report(err)
				return
			}
			f.Update()
			f.tell("Restored", fmt.Sprintf("The register is that of %s. What it was before is the backup of %s.", moment(chosen.At), moment(made.At)))
		})
}

// fileSize writes a number of bytes.
func fileSize(bytes int64) string {
	switch {
	case bytes >= 10<<20:
		return fmt.Sprintf("%d MB", bytes>>20)
	case bytes >= 1<<20:
		return fmt.Sprintf("%.1f MB", float64(bytes)/(1<<20))
	}
	return fmt.Sprintf("%d kB", (bytes+1023)>>10)
}
