// Command arrestcheck holds a fall and its stop, written down in a job file,
// against the limits the user entered, and prints what the figures say.
//
// This folder holds all contact with the outside: flags, files, streams,
// signals and exit codes. Everything it calls is pure.
package main

import "os"

func main() {
	os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr, os.Environ()...))
}
