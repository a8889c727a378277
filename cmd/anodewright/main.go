// Command anodewright is the desktop app: it opens the register and shows the
// fleet in a window.
package main

import (
	"flag"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/app"
	"fyne.io/fyne/v2/lang"

	"anodewright/app/crash"
	"anodewright/app/pages"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/assets/icon"
	"anodewright/hull"
	"anodewright/storage"
)

func main() {
	path := flag.String("register", "", "open this register `file` instead of the one in the user's data folder")
	date := flag.String("today", "", "plan as of this `date` (YYYY-MM-DD) instead of the machine's")
	demo := flag.Bool("demo", false, "fill a new register with the demo fleet")
	version := flag.Bool("version", false, "tell the program's version and stop")
	flag.Parse()
	if *version {
		fmt.Println("Anodewright", assets.Version)
		return
	}
	today := hull.DateOf(time.Now())
	if *date != "" {
		d, err := hull.ParseDate(*date)
		if err != nil {
			fmt.Fprintln(os.Stderr, "-today:", err)
			os.Exit(2)
		}
		today = d
	}
	say.Use(lang.SystemLocale().LanguageString()[:2]) // until the register says otherwise
	folder, unguard := guard()
	defer unguard()
	a := app.NewWithID("anodewright")
	a.SetIcon(fyne.NewStaticResource("anodewright.png", icon.PNG(256)))
	win := a.NewWindow("Anodewright")
	win.Resize(fyne.NewSize(1280, 800))
	s, at, closer, err := open(*path, today, *demo)
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		a.Lifecycle().SetOnStarted(func() { pages.Failed(a, win, err) })
		win.ShowAndRun()
		unguard()
		os.Exit(2)
	}
	f := pages.New(a, win, s)
	f.Opened(at)
	f.OpenRegister = another
	a.Lifecycle().SetOnStarted(func() {
		f.Restore()
		f.TellOfCrashes(crash.Collect(folder, time.Now()))
	})
	restoreSize(win, s)
	f.Quit = func() {
		keepSize(win, s)
		f.Close()
		win.Close()
	}
	win.SetCloseIntercept(f.Quit)
	win.ShowAndRun()
	s.Wait()
	closer()
}

// guard keeps what a crash says in the data folder, whose folder of reports it
// returns. Where that cannot be, the program does without.
func guard() (folder string, done func()) {
	path, err := storage.DefaultPath()
	if err != nil {
		return "", func() {}
	}
	folder = filepath.Join(filepath.Dir(path), "crash reports")
	if done, err = crash.Guard(folder, assets.Version, time.Now()); err != nil {
		return folder, func() {}
	}
	return folder, done
}

// another opens a register in a window, and a program, of its own.
func another(path string) error {
	self, err := os.Executable()
	if err != nil {
		return err
	}
	cmd := exec.Command(self, "-register", path)
	if err := cmd.Start(); err != nil {
		return err
	}
	return cmd.Process.Release()
}

// open opens the register, and fills a new one with the demo fleet if asked to.
// It returns the register's path.
func open(path string, today hull.Date, demo bool) (*session.Session, string, func(), error) {
	if path == "" {
		var err error
		if path, err = storage.DefaultPath(); err != nil {
			return nil, "", nil, err
		}
	}
	r, err := storage.Open(path)
	if err != nil {
		return nil, "", nil, err
	}
	s, err := session.Open(r, today)
	if err == nil && demo {
		var empty bool
		if empty, err = r.Empty(); err == nil && empty && r.ReadOnly() == "" {
			err = session.AddDemo(s)
		}
	}
	if err != nil {
		r.Close()
		return nil, "", nil, err
	}
	return s, r.Path(), func() { r.Close() }, nil
}

func restoreSize(win fyne.Window, s *session.Session) {
	w, err1 := strconv.ParseFloat(s.Setting("window width"), 32)
	h, err2 := strconv.ParseFloat(s.Setting("window height"), 32)
	if err1 == nil && err2 == nil && w >= 600 && h >= 400 {
		win.Resize(fyne.NewSize(float32(w), float32(h)))
	}
}

func keepSize(win fyne.Window, s *session.Session) {
	size := win.Canvas().Size()
	s.SetSetting("window width", fmt.Sprint(size.Width))
	s.SetSetting("window height", fmt.Sprint(size.Height))
}
