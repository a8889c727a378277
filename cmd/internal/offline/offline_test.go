//go:build linux && (amd64 || arm64)

package offline

import (
	"net"
	"os"
	"os/exec"
	"syscall"
	"testing"
)

const variable = "OFFLINE_TEST_DIALS"

// TestMain lets the test binary be the process that is denied the network.
func TestMain(m *testing.M) {
	dial, address := os.Getenv(variable), "127.0.0.1:9"
	if dial == "" {
		os.Exit(m.Run())
	}
	if err := Deny(); err != nil {
		os.Stderr.WriteString(err.Error())
		os.Exit(3)
	}
	switch dial {
	case "unix":
		address = "/nowhere"
	case "tcp6":
		address = "[::1]:9"
	}
	if _, err := net.Dial(dial, address); err == nil {
		os.Exit(4)
	}
}

// A process that asks for an internet socket is killed; one that asks for a
// socket of the machine lives.
func TestDeny(t *testing.T) {
	for dial, killed := range map[string]bool{"tcp4": true, "tcp6": true, "udp4": true, "unix": false} {
		cmd := exec.Command(os.Args[0])
		cmd.Env = append(os.Environ(), variable+"="+dial)
		out, err := cmd.CombinedOutput()
		status := cmd.ProcessState.Sys().(syscall.WaitStatus)
		if got := status.Signaled() && status.Signal() == syscall.SIGSYS; got != killed || !killed && err != nil {
			t.Errorf("%s: %v, %s", dial, err, out)
		}
	}
}
