package main

// toolVersion is the version of the program. The version of the mechanics is
// arrest.ModelVersion: it moves only when a printed figure can move. Both have
// their history in testdata/history.toml. A release sets it by the linker to
// what it is called.
var toolVersion = "0.1.0"
