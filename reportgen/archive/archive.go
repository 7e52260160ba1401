// Package archive keeps results so that they can be looked at again: the
// register of many jobs, the archive of one, its reproduction, and the
// comparison of two.
//
//   - Results are what came out of a job, as figures. They are taken from a
//     sheet (Of) or read from a result file (ReadResults), and have a canonical
//     form whose digest does not depend on the toolchain (Results.Digest).
//   - A Row is one job in a register; a Register writes rows one by one.
//   - Pack makes the files of an archive, a bag as in RFC 8493. Open looks at
//     one, Reproduce works it out again and tells what differs.
//   - Compare sets two results side by side.
//
// Everything here is pure: files come and go as bytes. The same bytes give the
// same bytes. The sentences are in reportgen, in wording_archive.go.
//
// What is not promised: an archive carries no signature. Whoever makes it anew
// as a whole leaves no trace in it, which is why its own digest is to be kept
// somewhere else.
package archive
