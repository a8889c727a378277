// Command anodewright is the desktop app: it opens the register and shows the
// fleet in a window.
package main

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/app"

	"anodewright/app/pages"
	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/assets/icon"
	"anodewright/hull"
	"anodewright/storage"
)

func main() {
	path := flag.String("register", "", "open this register `file` instead of the one in the user's data folder")
	date := flag.String("today", "", "plan as of this `date` (YYYY-MM-DD) instead of the machine's")
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
	a := app.NewWithID("anodewright")
	a.SetIcon(fyne.NewStaticResource("anodewright.png", icon.PNG(256)))
	win := a.NewWindow("Anodewright")
	win.Resize(fyne.NewSize(1280, 800))
	s, closer, err := open(*path, today)
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		a.Lifecycle().SetOnStarted(func() { pages.Failed(a, win, err) })
		win.ShowAndRun()
		os.Exit(2)
	}
	f := pages.New(a, win, s)
	a.Lifecycle().SetOnStarted(f.Restore)
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

// open opens the register, and fills a new one with the demo fleet.
func open(path string, today hull.Date) (*session.Session, func(), error) {
	if path == "" {
		var err error
		if path, err = storage.DefaultPath(); err != nil {
			return nil, nil, err
		}
	}
	r, err := storage.Open(path)
	if err != nil {
		return nil, nil, err
	}
	s, err := session.Open(r, today)
	if err == nil {
		var empty bool
		if empty, err = r.Empty(); err == nil && empty && r.ReadOnly() == "" {
			err = session.AddDemo(s)
		}
	}
	if err != nil {
		r.Close()
		return nil, nil, err
	}
	return s, func() { r.Close() }, nil
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
