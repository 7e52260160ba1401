//go:build !unix

package main

// mainOnFullDisk has no counterpart here; the scripts ask for [unix].
func mainOnFullDisk() { panic("no file size limit on this system") }
