//go:build linux && (amd64 || arm64)

// Package offline proves in tests that a program opens no network
// connection: it makes the kernel kill a process at once that asks for an
// internet socket. Sockets of the machine itself, as to the X server, stay
// allowed. It is for tests only, on Linux.
package offline

import (
	"fmt"
	"runtime"
	"syscall"
	"unsafe"
)

// Offsets into the kernel's struct seccomp_data, see seccomp(2). The low half
// of an argument comes first on little-endian machines.
const (
	offsetNumber = 0
	offsetArch   = 4
	offsetFirst  = 16
)

const (
	noNewPrivileges = 38 // PR_SET_NO_NEW_PRIVS
	setFilter       = 1  // SECCOMP_SET_MODE_FILTER
	allThreads      = 1  // SECCOMP_FILTER_FLAG_TSYNC
	killProcess     = 0x80000000
	allow           = 0x7fff0000
)

// Deny has this process, and all that it starts, killed with SIGSYS when it
// asks for a socket of the internet (IPv4 or IPv6). It cannot be taken back.
func Deny() error {
	runtime.LockOSThread()
	defer runtime.UnlockOSThread()
	load := func(offset uint32) syscall.SockFilter {
		return syscall.SockFilter{Code: syscall.BPF_LD | syscall.BPF_W | syscall.BPF_ABS, K: offset}
	}
	// A jump goes on when equal, else over as many steps as skip says.
	unless := func(k uint32, skip uint8) syscall.SockFilter {
		return syscall.SockFilter{Code: syscall.BPF_JMP | syscall.BPF_JEQ | syscall.BPF_K, K: k, Jf: skip}
	}
	answer := func(k uint32) syscall.SockFilter {
		return syscall.SockFilter{Code: syscall.BPF_RET | syscall.BPF_K, K: k}
	}
	steps := []syscall.SockFilter{
		load(offsetArch), unless(machine, 7),
		load(offsetNumber), unless(syscall.SYS_SOCKET, 5),
		load(offsetFirst), unless(syscall.AF_INET, 1), answer(killProcess),
		unless(syscall.AF_INET6, 1), answer(killProcess),
		answer(allow),
	}
	program := syscall.SockFprog{Len: uint16(len(steps)), Filter: &steps[0]}
	if _, _, e := syscall.Syscall6(syscall.SYS_PRCTL, noNewPrivileges, 1, 0, 0, 0, 0); e != 0 {
		return fmt.Errorf("offline: no new privileges: %w", e)
	}
	if _, _, e := syscall.Syscall(seccomp, setFilter, allThreads, uintptr(unsafe.Pointer(&program))); e != 0 {
		return fmt.Errorf("offline: filter: %w", e)
	}
	return nil
}
