//go:build linux

package against

import (
	"bufio"
	"fmt"
	"os"
	"os/exec"
	"strings"
	"testing"
	"time"
)

// BenchmarkStart is the app's start to its first window, with a register of
// the demo fleet, against a blank window of the toolkit, on a screen without a
// graphics card. The programs are named by the environment, as "dev bench" does.
func BenchmarkStart(b *testing.B) {
	app, blank := os.Getenv("ANODEWRIGHT_BIN"), os.Getenv("BLANK_BIN")
	if app == "" || blank == "" {
		b.Skip("ANODEWRIGHT_BIN and BLANK_BIN do not name the programs: start go run ./cmd/dev bench start")
	}
	for _, tool := range []string{"Xvfb", "xdotool"} {
		if _, err := exec.LookPath(tool); err != nil {
			b.Skip(tool + " is not on this machine")
		}
	}
	display := screen(b)
	home := b.TempDir()
	env := append(os.Environ(), "DISPLAY="+display, "HOME="+home, "XDG_CONFIG_HOME="+home+"/.config", "XDG_DATA_HOME="+home+"/.local/share", "LANG=en_GB.UTF-8", "FYNE_SCALE=1")
	start := func(program, window string) time.Duration {
		began := time.Now()
		cmd := exec.Command(program)
		cmd.Env = env
		if err := cmd.Start(); err != nil {
			b.Fatal(err)
		}
		defer func() {
			cmd.Process.Kill()
			cmd.Wait()
		}()
		for time.Since(began) < time.Minute {
			find := exec.Command("xdotool", "search", "--onlyvisible", "--name", window)
			find.Env = env
			if out, err := find.Output(); err == nil && len(out) > 0 {
				return time.Since(began)
			}
			time.Sleep(2 * time.Millisecond)
		}
		b.Fatalf("%s shows no window named %s", program, window)
		return 0
	}
	start(app, "Anodewright") // fills the register
	start(blank, "Blank")
	for b.Loop() {
		x, y := best(7, func() time.Duration { return start(app, "Anodewright") }, func() time.Duration { return start(blank, "Blank") })
		longer(b, x, y)
	}
}

// screen starts a server of its own and returns its display.
func screen(b *testing.B) string {
	r, w, err := os.Pipe()
	if err != nil {
		b.Fatal(err)
	}
	cmd := exec.Command("Xvfb", "-displayfd", "3", "-screen", "0", "1280x800x24", "-nolisten", "tcp", "-noreset")
	cmd.ExtraFiles = []*os.File{w}
	if err := cmd.Start(); err != nil {
		b.Fatal(err)
	}
	w.Close()
	b.Cleanup(func() { cmd.Process.Kill(); cmd.Wait() })
	line, err := bufio.NewReader(r).ReadString('\n')
	if err != nil {
		b.Fatalf("Xvfb tells no display: %v", err)
	}
	return fmt.Sprint(":", strings.TrimSpace(line))
}
