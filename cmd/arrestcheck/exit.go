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

// exitHelps is what the help of each command says of exit codes; "" is the
// program itself.
var exitHelps = map[string]string{
	"": exitHelp, "check": exitHelp, "register": registerExit, "archive": archiveExit, "reproduce": reproduceExit, "compare": compareExit,
}

const registerExit = `Exit codes: the worst of all jobs, in the order 4, 3, 1, 2, 0
  0    of every job every limit within as entered and nothing left out
  1    of some job a limit is exceeded
  2    otherwise: something is undecided, not compared or not entered, or there
       is no job at all
  3    a job or the command line is refused; the other jobs have their rows
  4    a file cannot be read or written, or an internal error
  130  interrupted; no file is written
0 permits nothing: the competent or qualified person and local code decide.
`

const archiveExit = `Exit codes:
  0    archived, whatever its limits came to
  3    refused: the command line or a file has faults; nothing is written
  4    a file cannot be read or written, or an internal error
  130  interrupted; nothing is written
`

const reproduceExit = `Exit codes: the worst of all archives, in the order 4, 3, 1, 0
  0    the same: every digest, every figure and outcome, every report; with
       --limits every outcome too
  1    something differs, or the archived job is no longer read
  3    the command line is refused, or a folder is no whole archive
  4    a file cannot be read or written, or an internal error
  130  interrupted; no file is written
0 permits nothing, and does not say that the figures are right.
`

const compareExit = `Exit codes:
  0    no input, figure or outcome differs
  1    something differs
  3    refused: the command line, a job or an archive has faults
  4    a file cannot be read or written, or an internal error
  130  interrupted; no file is written
`

// The codes of what is held against what it was, or against another.
const (
	exitSame    = exitWithin
	exitDiffers = exitExceeded
)

// codeOfSame returns what such a comparison comes to.
func codeOfSame(same bool) exitCode {
	if same {
		return exitSame
	}
	return exitDiffers
}

// worseThan reports whether c counts before d. Codes that this program never
// ends with count before none.
func (c exitCode) worseThan(d exitCode) bool { return severity[c] > severity[d] }

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
	switch {
	case a.Exceeded():
		return exitExceeded
	case a.Settled():
		return exitWithin
	}
	return exitOtherwise
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
