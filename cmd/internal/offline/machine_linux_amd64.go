package offline

const (
	machine = 0xc000003e // AUDIT_ARCH_X86_64
	seccomp = 317        // number of the system call
)
