package main

import (
	"context"
	"errors"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

// An exitCode is what the program tells the shell. No other file decides one.
type exitCode int

const (
	exitWithin      exitCode = 0
	exitExceeded    exitCode = 1
	exitOtherwise   exitCode = 2
	exitRefused     exitCode = 3
	exitFile        exitCode = 4
	exitInterrupted exitCode = 130 // 128 + SIGINT, as shells count
)

// exitHelp is printed below the help of the commands that check.
const exitHelp = `Exit codes:
  0    every limit within as entered and nothing left out
  1    a limit is exceeded
  2    otherwise: something is undecided, not compared or not entered
  3    refused: the command line or a file has faults; nothing is written
  4    a file cannot be read or written, or an internal error
  130  interrupted; no file is written
Of several files the worst counts, in the order 4, 3, 1, 2, 0.
0 permits nothing: it says that the entered figures are within the entered
limits. The competent or qualified person and local code decide.
`

// severity orders the codes for the worst of several files.
var severity = map[exitCode]int{
	exitWithin: 0, exitOtherwise: 1, exitExceeded: 2, exitRefused: 3, exitFile: 4, exitInterrupted: 5,
}

// worst returns the code that counts for the two together.
func worst(a, b exitCode) exitCode {
	if severity[b] > severity[a] {
		return b
	}
	return a
}

// codeOfAssessment returns what one checked job comes to. A job without a
// single limit is never 0: nothing was compared.
func codeOfAssessment(a *limits.Assessment) exitCode {
	n := a.Counts()
	switch {
	case n[limits.Exceeded] > 0:
		return exitExceeded
	case len(a.Groups) == 0, n[limits.Within] != len(a.Groups), len(a.NotEntered) > 0:
		return exitOtherwise
	}
	return exitWithin
}

// codeOfError returns what a failure comes to; of joined failures the worst.
func codeOfError(err error) exitCode {
	if joined, ok := err.(interface{ Unwrap() []error }); ok {
		code := exitWithin
		for _, e := range joined.Unwrap() {
			code = worst(code, codeOfError(e))
		}
		return code
	}
	var faults *jobfile.Faults
	var usage *usageError
	switch {
	case errors.Is(err, context.Canceled):
		return exitInterrupted
	case errors.As(err, &faults) && faults.Unreadable():
		return exitFile
	case faults != nil, errors.As(err, &usage):
		return exitRefused
	}
	return exitFile
}
