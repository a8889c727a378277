package offline

const (
	machine = 0xc00000b7 // AUDIT_ARCH_AARCH64
	seccomp = 277        // number of the system call
)
