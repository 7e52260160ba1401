package archive

import (
	"fmt"
	"io/fs"
	"strconv"
	"strings"
	"unicode"
)

// Names of the files of a bag, RFC 8493.
const (
	declarationFile = "bagit.txt"
	infoFile        = "bag-info.txt"
	manifestFile    = "manifest-sha256.txt"
	tagManifestFile = "tagmanifest-sha256.txt"
	payload         = "data/"
)

// declaration is all of bagit.txt.
const declaration = "BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n"

// An entry is one line of a manifest.
type entry struct{ digest, path string }

// manifest returns the lines of a manifest, as sha256sum writes and reads them.
func manifest(files []File) []byte {
	var b strings.Builder
	for _, f := range files {
		b.WriteString(digest(f.Data) + "  " + f.Path + "\n")
	}
	return []byte(b.String())
}

// parseManifest reads a manifest as Pack writes it: each line a digest in small
// letters, two blanks and a path. What could be read in two ways is refused.
func parseManifest(name string, data []byte) ([]entry, error) {
	text := string(data)
	if !strings.HasSuffix(text, "\n") {
		return nil, fmt.Errorf("%s does not end with a line", name)
	}
	var entries []entry
	known := make(map[string]bool)
	n := 0
	for line := range strings.SplitSeq(strings.TrimSuffix(text, "\n"), "\n") {
		n++
		digest, path, found := strings.Cut(line, "  ")
		switch {
		case !found || len(digest) != 64 || strings.Trim(digest, "0123456789abcdef") != "":
			return nil, fmt.Errorf("%s, line %d is no digest with two blanks and a path behind it", name, n)
		case unfit(path) != "":
			return nil, fmt.Errorf("%s, line %d: %q: %s", name, n, path, unfit(path))
		case known[fold(path)]:
			return nil, fmt.Errorf("%s, line %d: %q is named twice", name, n, path)
		}
		known[fold(path)] = true
		entries = append(entries, entry{digest, path})
	}
	return entries, nil
}

// unfit says why a path cannot stand in an archive; empty where it can. A path
// has to mean one file below the folder of the archive, on every system and to
// every reader of manifests.
func unfit(path string) string {
	switch {
	case !fs.ValidPath(path) || path == ".":
		return "no path below the folder of the archive"
	case strings.ContainsAny(path, `\:*?"<>|`):
		return "a character that some systems do not have in a name"
	case strings.Contains(path, "%"):
		return "a % in a name is written otherwise in a manifest, and sha256sum does not find the file"
	case strings.ContainsFunc(path, func(r rune) bool { return !unicode.IsPrint(r) }):
		return "a character that does not show"
	case strings.ContainsRune(path, unicode.ReplacementChar):
		return "no UTF-8"
	}
	for part := range strings.SplitSeq(path, "/") {
		if strings.HasSuffix(part, ".") || strings.Trim(part, " ") != part {
			return "a part that ends with a point or stands between blanks"
		}
	}
	return ""
}

// fold returns a path as systems see it that do not tell capital letters apart.
func fold(path string) string { return strings.ToLower(path) }

// oxum is the sum of the sizes and the number of payload files, as bag-info.txt
// states it.
func oxum(bytes int64, files int) string {
	return strconv.FormatInt(bytes, 10) + "." + strconv.Itoa(files)
}
