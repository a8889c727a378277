package pages

import (
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/storage"
)

// backupDaily makes the day's backup; that it failed is told.
func (f *Frame) backupDaily() {
	if err := f.s.BackupDaily(); err != nil {
		f.tell(say.T("No backup could be made today"), say.T("%s. The register itself is as it was.", inWords(err)))
	}
}

// restoreBackup shows the register's backups, to restore one.
func (f *Frame) restoreBackup() {
	all, err := f.s.Backups()
	switch {
	case err != nil:
		f.report(err)
	case len(all) == 0:
		f.tell(say.T("No backup yet"), say.T("The program makes one at its start when the last is a day old, and keeps the last ten."))
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
	note := say.T("A backup holds the whole register: every asset with its history. The register as it is now is backed up before, so that this can be taken back in the same way.")
	return &backupsDialog{newListDialog(f, say.T("Restore a backup"), note, []grid.Column{
		{Title: say.T("Made"), Width: 185},
		{Title: say.T("Size"), Width: 90, Right: true},
		{Title: say.T("File"), Width: 300, Fill: true},
	}, rows), all}
}

func (b *backupsDialog) open() {
	b.show(look.Button(say.T("Cancel"), b.close), look.AccentButton(say.T("Restore this backup…"), b.restore))
}

func (b *backupsDialog) restore() {
	chosen := b.backups[b.row()]
	b.close()
	f := b.f
	f.confirm(say.T("Restore the backup of %s?", moment(chosen.At)),
		say.T("All assets become what they were then. The register as it is now is backed up first."), say.T("Restore"), func() {
			made, err := f.s.RestoreBackup(chosen.Path)
			if err != nil {
				f.report(err)
				return
			}
			f.Update()
			f.tell(say.T("Restored"), say.T("The register is that of %s. What it was before is the backup of %s.", moment(chosen.At), moment(made.At)))
		})
}

// fileSize writes a number of bytes.
func fileSize(bytes int64) string {
	switch {
	case bytes >= 10<<20:
		return say.T("%d MB", bytes>>20)
	case bytes >= 1<<20:
		return say.T("%.1f MB", float64(bytes)/(1<<20))
	}
	return say.T("%d kB", (bytes+1023)>>10)
}
