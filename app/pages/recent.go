package pages

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/say"
)

// The registers opened last are kept in the program's preferences, not in a
// register: the list is about all of them.
const (
	recentRegisters = "recent registers"
	mostRecent      = 8
)

// Opened tells which register the window shows, for the list of recent ones.
func (f *Frame) Opened(path string) {
	f.opened = path
	list := slices.DeleteFunc(f.app.Preferences().StringList(recentRegisters), func(s string) bool { return s == path })
	list = append([]string{path}, list...)
	f.app.Preferences().SetStringList(recentRegisters, list[:min(len(list), mostRecent)])
	f.win.SetMainMenu(f.menu())
	f.updateMenu()
}

// recent are the other registers opened lately that are still there.
func (f *Frame) recent() []string {
	var list []string
	for _, path := range f.app.Preferences().StringList(recentRegisters) {
		if info, err := os.Stat(path); err == nil && info.Mode().IsRegular() && path != f.opened {
			list = append(list, path)
		}
	}
	return list
}

// recentItem is the menu of them.
func (f *Frame) recentItem() *fyne.MenuItem {
	m := fyne.NewMenuItem(say.T("Recent registers"), nil)
	var items []*fyne.MenuItem
	for _, path := range f.recent() {
		items = append(items, fyne.NewMenuItem(path, func() { f.report(f.openRegister(path)) }))
	}
	if len(items) == 0 {
		none := fyne.NewMenuItem(say.T("none yet"), nil)
		none.Disabled = true
		items = append(items, none)
	}
	m.ChildMenu = fyne.NewMenu("", items...)
	return m
}

func (f *Frame) openRegister(path string) error {
	if f.OpenRegister == nil {
		return errors.New(say.T("this window opens no other register"))
	}
	return f.OpenRegister(path)
}

// chooseRegister asks for a register and opens it in a window of its own; one
// that is not there is made.
func (f *Frame) chooseRegister() {
	browse := func(e *widget.Entry) {
		d := dialog.NewFileOpen(func(r fyne.URIReadCloser, err error) {
			if r != nil {
				e.SetText(r.URI().Path())
				r.Close()
			}
		}, f.win)
		d.SetFilter(storage.NewExtensionFileFilter([]string{".anodewright"}))
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	f.ask(say.T("Open a register"), say.T("Register file; one that is not there is made. It opens in a window of its own"),
		filepath.Join(filepath.Dir(f.opened), "fleet.anodewright"), say.T("Open"), browse, func(path string) (string, error) {
			if !filepath.IsAbs(path) {
				path = filepath.Join(filepath.Dir(f.opened), path)
			}
			if !strings.EqualFold(filepath.Ext(path), ".anodewright") {
				path += ".anodewright"
			}
			if path == f.opened {
				return "", errors.New(say.T("this register is open here"))
			}
			return "", f.openRegister(path)
		})
}

// TellOfCrashes says where the reports of crashes are that were not yet told.
func (f *Frame) TellOfCrashes(paths []string) {
	if len(paths) == 0 {
		return
	}
	f.tell(say.T("The program fell over last time"), say.T("What you had entered is kept. What went wrong is written in the file below, which is sent to nobody; please give it to whoever looks after the program for you.")+
		"\n\n"+strings.Join(paths, "\n"))
}
