//go:build e2e && !ci && linux

package main_test

import (
	"bufio"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"syscall"
	"testing"

	"anodewright/cmd/internal/offline"
)

// The screen all journeys share, and the program they drive; both are made by
// TestMain.
var (
	display string // as in the variable DISPLAY
	program string // path of the app under test
)

// TestMain starts an X server of our own, finds or builds the app, and runs
// the journeys.
func TestMain(m *testing.M) {
	// The X server is to end with the thread that started it.
	runtime.LockOSThread()
	os.Exit(withScreen(m.Run))
}

// withScreen runs the journeys and returns the exit status.
func withScreen(run func() int) int {
	server, err := startScreen()
	if err != nil {
		fmt.Fprintln(os.Stderr, "starting Xvfb:", err)
		return 1
	}
	defer func() {
		_ = server.Process.Kill()
		_ = server.Wait()
	}()

	dir, err := os.MkdirTemp("", "anodewright-e2e-")
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		return 1
	}
	defer os.RemoveAll(dir)
	if program, err = findProgram(dir); err != nil {
		fmt.Fprintln(os.Stderr, err)
		return 1
	}
	// From here on opening a network connection kills the app, whichever
	// journey it is on.
	if err := offline.Deny(); err != nil && !errors.Is(err, errors.ErrUnsupported) {
		fmt.Fprintln(os.Stderr, err)
		return 1
	}
	return run()
}

// startScreen starts Xvfb on a display number that the server itself finds
// free, and waits until it is ready.
func startScreen() (*exec.Cmd, error) {
	number, write, err := os.Pipe()
	if err != nil {
		return nil, err
	}
	defer number.Close()
	cmd := exec.Command("Xvfb", "-displayfd", "3", "-screen", "0", "1280x800x24", "-nolisten", "tcp", "-noreset")
	cmd.ExtraFiles = []*os.File{write} // descriptor 3
	cmd.SysProcAttr = &syscall.SysProcAttr{Pdeathsig: syscall.SIGKILL}
	err = cmd.Start()
	write.Close()
	if err != nil {
		return nil, err
	}
	line, err := bufio.NewReader(number).ReadString('\n')
	if err != nil {
		_ = cmd.Wait()
		return nil, fmt.Errorf("no display number: %w", err)
	}
	display = ":" + strings.TrimSpace(line)
	return cmd, nil
}

// findProgram returns the binary named by ANODEWRIGHT_BIN, or builds one into
// dir. It must be built without the tag migrated_fynedo: only then does the
// toolkit report calls from a wrong thread.
func findProgram(dir string) (string, error) {
	if path := os.Getenv("ANODEWRIGHT_BIN"); path != "" {
		if _, err := os.Stat(path); err != nil {
			return "", fmt.Errorf("ANODEWRIGHT_BIN: %w", err)
		}
		return path, nil
	}
	path := filepath.Join(dir, "anodewright")
	cmd := exec.Command("go", "build", "-buildvcs=false", "-o", path, ".")
	cmd.Env = append(os.Environ(), "CGO_ENABLED=1", "CC=clang")
	if out, err := cmd.CombinedOutput(); err != nil {
		return "", fmt.Errorf("building the app: %w\n%s", err, out)
	}
	return path, nil
}
