package main

// toolVersion is the version of the program. The version of the mechanics is
// arrest.ModelVersion: it moves only when a printed figure can move.
const toolVersion = "0.1.0"
