package archive

import (
	"strconv"

	"arrestcheck/reportgen"
)

// Packed says what was archived, and with which digest.
func Packed(folder string, files []File, s *reportgen.Sheet) reportgen.Report {
	results := Of(s)
	whole := files[len(files)-1]
	return reportgen.Report{Head: []reportgen.Block{
		{Lines: []reportgen.Line{
			{Label: reportgen.ArchiveLabel, Text: folder},
			{Label: reportgen.ArchivedJobLabel, Text: results.Job.line()},
			{Label: reportgen.ComesToLabel, Text: results.Counts.text()},
			{Label: reportgen.FilesLabel, Text: strconv.Itoa(len(files))},
			{Label: reportgen.ResultsLabel, Text: results.Digest()},
			{Label: reportgen.DigestLabel, Text: digest(whole.Data)},
		}},
		{Text: words.KeepDigest.Say(whole.Path)},
	}}
}
