//go:build e2e && !ci && linux

package main_test

import (
	"bytes"
	"errors"
	"fmt"
	"image"
	"image/png"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"
)

const (
	title    = "^Anodewright" // what the window's name must match
	patience = 15 * time.Second
	holdKey  = "0.05" // seconds between press and release; instant ones get lost
)

// window is a running app with its window on the screen. Its methods fail the
// test when something cannot be done.
type window struct {
	t        *testing.T
	home     string // folder that holds everything the app keeps
	register string // file the app was told to keep its register in
	id       string // X window
	cmd      *exec.Cmd
	stderr   *syncBuffer
	exited   chan struct{} // closed when the process has ended
	status   error         // of the process, once exited is closed
}

// open starts the app with a new, empty home folder and waits for its window.
func open(t *testing.T, args ...string) *window {
	t.Helper()
	return openIn(t, t.TempDir(), args...)
}

// openIn starts the app with a home folder that may have been used before.
// When the test ends the app is stopped, if it still runs, and whatever it
// wrote to standard error is searched for faults.
func openIn(t *testing.T, home string, args ...string) *window {
	t.Helper()
	w := &window{t: t, home: home, register: filepath.Join(home, "fleet.anodewright")}
	args = append([]string{"-register", w.register}, args...)
	w.launch(args)
	if !w.appears() && strings.Contains(w.stderr.String(), "processMouseMoved") {
		// Fyne 2.7.1 now and then gets a mouse event before it has a window
		// to send it to, and falls over.
		t.Log("the toolkit fell over at start; trying once more")
		<-w.exited
		w.launch(args)
		w.appears()
	}
	t.Cleanup(w.finish)
	if w.id == "" {
		t.Fatalf("no window named %s came up; standard error:\n%s", title, w.stderr)
	}
	w.focus()
	return w
}

// launch starts the process.
func (w *window) launch(args []string) {
	w.t.Helper()
	w.stderr = &syncBuffer{}
	w.exited = make(chan struct{})
	w.cmd = exec.Command(program, args...)
	w.cmd.Dir = w.home
	w.cmd.Stderr = w.stderr
	w.cmd.Env = appEnv(w.home)
	w.cmd.SysProcAttr = &syscall.SysProcAttr{Pdeathsig: syscall.SIGKILL}
	if err := w.cmd.Start(); err != nil {
		w.t.Fatal(err)
	}
	cmd, exited := w.cmd, w.exited
	go func() {
		w.status = cmd.Wait()
		close(exited)
	}()
}

// appEnv is the whole environment of the app, so that nothing of the user's
// leaks in.
func appEnv(home string) []string {
	return []string{
		"PATH=" + os.Getenv("PATH"),
		"DISPLAY=" + display,
		"HOME=" + home,
		"XDG_DATA_HOME=" + filepath.Join(home, "data"),
		"XDG_CONFIG_HOME=" + filepath.Join(home, "config"),
		"XDG_CACHE_HOME=" + filepath.Join(home, "cache"),
		"DBUS_SESSION_BUS_ADDRESS=unix:path=" + filepath.Join(home, "no-bus"),
		"LANG=en_GB.UTF-8",
		"LC_CTYPE=C.UTF-8",
		"LIBGL_ALWAYS_SOFTWARE=1",
		"FYNE_SCALE=1",
		"FYNE_THEME=light",
	}
}

// appears waits until the window is there and has been painted, and reports
// whether it is.
func (w *window) appears() bool {
	w.t.Helper()
	return w.poll(patience, func() bool {
		out, err := w.xdotool("search", "--onlyvisible", "--all", "--pid", strconv.Itoa(w.cmd.Process.Pid), "--name", title)
		if err != nil {
			return false
		}
		w.id, _, _ = strings.Cut(strings.TrimSpace(out), "\n")
		picture, err := w.picture()
		return err == nil && !plain(picture)
	})
}

// focus gives the window the keyboard; there is no window manager to do it.
func (w *window) focus() {
	w.t.Helper()
	w.must("windowfocus", w.id)
	w.wait("the window to have the keyboard", func() bool {
		out, err := w.xdotool("getwindowfocus")
		return err == nil && strings.TrimSpace(out) == w.id
	})
}

// key presses a key or a combination such as "ctrl+s" or "Tab", under the
// names xdotool knows.
func (w *window) key(name string) {
	w.t.Helper()
	w.must("keydown", name, "sleep", holdKey, "keyup", name, "sleep", holdKey)
}

// write types text as from a keyboard.
func (w *window) write(text string) {
	w.t.Helper()
	w.must("type", "--delay", "50", "--", text)
}

// click presses the left button at a point, counted in pixels from the
// window's top left corner. Two clicks at one point within 300 ms may count
// as a double click.
func (w *window) click(x, y int) {
	w.t.Helper()
	w.must("mousemove", "--window", w.id, strconv.Itoa(x), strconv.Itoa(y), "sleep", holdKey,
		"mousedown", "1", "sleep", holdKey, "mouseup", "1", "sleep", holdKey)
}

// wait polls until done reports true; it fails the test when patience runs
// out or the app ends.
func (w *window) wait(what string, done func() bool) {
	w.t.Helper()
	if !w.poll(patience, done) {
		w.t.Fatalf("waited in vain for %s; standard error:\n%s", what, w.stderr)
	}
}

// poll calls done every 50 ms until it reports true, and returns false when
// the time is up or the app has ended.
func (w *window) poll(limit time.Duration, done func() bool) bool {
	for end := time.Now().Add(limit); time.Now().Before(end); time.Sleep(50 * time.Millisecond) {
		if done() {
			return true
		}
		select {
		case <-w.exited:
			return done()
		default:
		}
	}
	return false
}

// picture returns what the window shows.
func (w *window) picture() (image.Image, error) {
	cmd := exec.Command("import", "-window", w.id, "png:-")
	cmd.Env = append(os.Environ(), "DISPLAY="+display)
	out, err := cmd.Output()
	if err != nil {
		return nil, err
	}
	return png.Decode(bytes.NewReader(out))
}

// plain reports whether a picture is all of one colour.
func plain(picture image.Image) bool {
	b := picture.Bounds()
	first := picture.At(b.Min.X, b.Min.Y)
	for y := b.Min.Y; y < b.Max.Y; y++ {
		for x := b.Min.X; x < b.Max.X; x++ {
			if picture.At(x, y) != first {
				return false
			}
		}
	}
	return true
}

// shot writes what the whole screen shows to a PNG file.
func (w *window) shot(path string) error {
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		return err
	}
	cmd := exec.Command("import", "-window", "root", path)
	cmd.Env = append(os.Environ(), "DISPLAY="+display)
	if out, err := cmd.CombinedOutput(); err != nil {
		return fmt.Errorf("import: %w: %s", err, out)
	}
	return nil
}

// close asks the app to end as the window's close button does, and waits
// until it has ended.
func (w *window) close() {
	w.t.Helper()
	id, err := strconv.ParseUint(w.id, 10, 32)
	if err != nil {
		w.t.Fatal(err)
	}
	if err := askToClose(display, uint32(id)); err != nil {
		w.t.Fatal("closing the window:", err)
	}
	w.ends()
}

// ends waits for the app to end of its own accord and without an error.
func (w *window) ends() {
	w.t.Helper()
	w.endsWith(0)
}

// endsWith waits for the app to end of its own accord with an exit status.
func (w *window) endsWith(status int) {
	w.t.Helper()
	select {
	case <-w.exited:
	case <-time.After(patience):
		w.t.Fatalf("the app did not end; standard error:\n%s", w.stderr)
	}
	if got := w.cmd.ProcessState.ExitCode(); got != status {
		w.t.Errorf("the app ended with %v; standard error:\n%s", w.status, w.stderr)
	}
}

// kill ends the app at once, as a crash or a power cut would.
func (w *window) kill() {
	w.t.Helper()
	if err := w.cmd.Process.Kill(); err != nil && !errors.Is(err, os.ErrProcessDone) {
		w.t.Fatal(err)
	}
	<-w.exited
}

// finish is run at the end of a test: it looks for faults on standard error,
// keeps a picture of a failed test, and leaves no process behind.
func (w *window) finish() {
	if found := fault(w.stderr.String()); found != "" {
		w.t.Errorf("a fault on standard error:\n%s", found)
	}
	select {
	case <-w.exited:
		return
	default:
	}
	if w.t.Failed() {
		path := filepath.Join("testdata", "failed", strings.ReplaceAll(w.t.Name(), "/", "_")+".png")
		if err := w.shot(path); err != nil {
			w.t.Log(err)
		} else {
			w.t.Log("the screen is kept in", path)
		}
	}
	w.kill()
}

// fault returns the first line that tells of a misuse of the user interface's
// thread or of a panic, with some lines after it that say where; or "".
func fault(stderr string) string {
	lines := strings.Split(stderr, "\n")
	for i, line := range lines {
		if strings.Contains(line, "Error in Fyne call thread") || strings.Contains(line, "panic") {
			return strings.Join(lines[i:min(i+12, len(lines))], "\n")
		}
	}
	return ""
}

// xdotool runs xdotool on the screen and returns what it prints.
func (w *window) xdotool(args ...string) (string, error) {
	cmd := exec.Command("xdotool", args...)
	cmd.Env = append(os.Environ(), "DISPLAY="+display)
	out, err := cmd.Output()
	return string(out), err
}

// must runs xdotool and fails the test when it fails.
func (w *window) must(args ...string) {
	w.t.Helper()
	if _, err := w.xdotool(args...); err != nil {
		w.t.Fatalf("xdotool %s: %v", strings.Join(args, " "), err)
	}
}

// syncBuffer collects output that is read while it is still being written.
type syncBuffer struct {
	mu   sync.Mutex
	text bytes.Buffer
}

func (b *syncBuffer) Write(p []byte) (int, error) {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.text.Write(p)
}

func (b *syncBuffer) String() string {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.text.String()
}
