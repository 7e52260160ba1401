//go:build unix

package main

import (
	"os"
	"os/signal"
	"syscall"
)

// mainOnFullDisk is the program where no file can grow beyond 100 bytes: the
// system then refuses a write as it does on a full disk.
func mainOnFullDisk() {
	signal.Ignore(syscall.SIGXFSZ)
	small := syscall.Rlimit{Cur: 100, Max: 100}
	if err := syscall.Setrlimit(syscall.RLIMIT_FSIZE, &small); err != nil {
		panic(err)
	}
	os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr, os.Environ()...))
}
