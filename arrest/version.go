package arrest

// ModelVersion is raised whenever a printed number of an unchanged job
// changes. Results carry it, so that an old archive can be told from a new
// calculation.
const ModelVersion = "2"
