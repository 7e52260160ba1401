package main

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write what the program prints now into the README")

// The README's job and limit set are read from it and checked: what it shows
// of the report must be what the program prints.
func TestReadmeIsTrue(t *testing.T) {
	readme := readText(t, "../../README.md")
	toml, shown := blocks(readme, "toml"), blocks(readme, "text")
	if len(toml) != 4 || len(shown) != 4 {
		t.Fatalf("%d toml and %d text blocks, want 4 and 4", len(toml), len(shown))
	}
	dir := t.TempDir()
	job := filepath.Join(dir, "job.toml")
	writeText(t, job, toml[0])
	writeText(t, filepath.Join(dir, "site-limits.toml"), toml[1])

	code, stdout, stderr := try("check", job)
	if code != int(exitExceeded) || stderr != "" {
		t.Errorf("exit code %d, %s", code, stderr)
	}
	for i, want := range []string{
		between(t, stdout, "\nLimits  ", "\n━"),
		between(t, stdout, "\nLimits as entered", "\nPeaks\n"),
	} {
		if *update {
			readme = strings.Replace(readme, shown[i], want, 1)
		} else if shown[i] != want {
			t.Errorf("excerpt %d is:\n%s\nthe report holds:\n%s", i+1, shown[i], want)
		}
	}
	if *update {
		writeText(t, "../../README.md", readme)
	}

	// The parts are added to the job, beside the stop.
	path, series := filepath.Join(dir, "path.toml"), filepath.Join(dir, "arrest.csv")
	writeText(t, path, toml[0]+toml[2])
	code, stdout, _ = try("check", "--series", series, path)
	if code != int(exitExceeded) || !strings.Contains(stdout, "absorber") || !strings.HasPrefix(readText(t, series), seriesHeader) {
		t.Errorf("with a connector path: exit code %d", code)
	}

	// So is the layout, whose free fall fits the one typed. The least of its heights
	// leave the least fall, 1.45 - 1.62 + sqrt(1.8^2 - 0.4^2) = 1.58 m, the greatest
	// 1.55 - 1.58 + sqrt(1.8^2 - 0.2^2) = 1.76 m.
	layout := filepath.Join(dir, "layout.toml")
	writeText(t, layout, toml[0]+toml[3])
	code, stdout, _ = try("check", "--units", "si", layout)
	for _, want := range []string{"1.58 to 1.76 m", "Clearance by the entries", "stop.distance", "would do by the", `"slipway"`} {
		if code != int(exitExceeded) || !strings.Contains(strings.ReplaceAll(stdout, "\u00a0", " "), want) {
			t.Errorf("with a layout: exit code %d, no %q", code, want)
		}
	}
	for line := range strings.Lines(shown[3]) {
		if !strings.Contains(exitHelp, "  "+line) {
			t.Errorf("the help does not hold this exit code:\n%s", line)
		}
	}
}

// between returns the lines of text from the one that begins with from to the
// last one with letters before to.
func between(t *testing.T, text, from, to string) string {
	t.Helper()
	_, rest, found := strings.Cut(text, from)
	part, _, ended := strings.Cut(rest, to)
	if !found || !ended {
		t.Fatalf("nothing between %q and %q in:\n%s", from, to, text)
	}
	return strings.TrimLeft(from, "\n") + strings.TrimRight(part, "\n") + "\n"
}

// Every command and flag that the README lists exists, and every one that
// exists is listed.
func TestReadmeListsTheCommands(t *testing.T) {
	list := blocks(readText(t, "../../README.md"), "text")[2]
	_, help, _ := try("help")
	for _, name := range regexp.MustCompile(`(?m)^  ([a-z]+)  `).FindAllStringSubmatch(help, -1) {
		if name[1] != "help" && !strings.Contains(list, "\narrestcheck "+name[1]+" ") && !strings.HasPrefix(list, "arrestcheck "+name[1]+" ") {
			t.Errorf("the list lacks the command %s", name[1])
		}
	}
	flags := regexp.MustCompile(`--([a-z]+)`)
	all := ""
	for _, command := range []string{"check", "new"} {
		_, help, _ = try("help", command)
		_, help, _ = strings.Cut(help, "\nFlags:\n")
		help, _, _ = strings.Cut(help, "\nExamples:\n")
		all += help
	}
	for _, name := range flags.FindAllString(all, -1) {
		if name != "--help" && !strings.Contains(list, name+" ") {
			t.Errorf("the list lacks the flag %s", name)
		}
	}
	for _, name := range flags.FindAllString(list, -1) {
		if !strings.Contains(all, name+" ") {
			t.Errorf("no command has the flag %s", name)
		}
	}
}

// blocks returns the fenced blocks of one language.
func blocks(markdown, language string) (all []string) {
	fence := regexp.MustCompile("(?s)\n```" + language + "\n(.*?)\n```\n")
	for _, b := range fence.FindAllStringSubmatch(markdown, -1) {
		all = append(all, b[1]+"\n")
	}
	return all
}

// try runs the program in this process.
func try(args ...string) (code int, stdout, stderr string) {
	var out, remarks bytes.Buffer
	code = run(args, strings.NewReader(""), &out, &remarks)
	return code, out.String(), remarks.String()
}

func readText(t *testing.T, path string) string {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func writeText(t *testing.T, path, text string) {
	t.Helper()
	if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

// Every file and folder that DEVELOPERS.md names exists.
func TestDevelopersNamesWhatExists(t *testing.T) {
	text := readText(t, "../../DEVELOPERS.md")
	names := regexp.MustCompile("`([a-z_./-]*/[a-z_.-]+|[A-Z]+\\.md)`").FindAllStringSubmatch(text, -1)
	if len(names) < 40 {
		t.Errorf("only %d names found", len(names))
	}
	for _, name := range names {
		if _, err := os.Stat(filepath.Join("../..", name[1])); err != nil {
			t.Error(err)
		}
	}
}

// The comparison with published data stands in DEVELOPERS.md as its test prints
// it.
func TestDevelopersShowsTheComparison(t *testing.T) {
	shown := blocks(readText(t, "../../DEVELOPERS.md"), "text")
	if last := shown[len(shown)-1]; last != readText(t, "../../testdata/validation/published.txt") {
		t.Errorf("DEVELOPERS.md shows another comparison than testdata/validation/published.txt:\n%s", last)
	}
}
