package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"github.com/fsnotify/fsnotify"
	"github.com/mattn/go-isatty"
	"github.com/spf13/cobra"
	"golang.org/x/term"

	"arrestcheck/reportgen"
)

const watchLong = `Checks a job again each time it or one of its limit files is saved, and shows
the result in place on the terminal: the counts, the worst row, the limits and
the warnings, as far as there is room. Ctrl-C ends it.
`

// settleTime is how long files are left alone after a change: editors save in
// several steps.
const settleTime = 100 * time.Millisecond

func newWatch(o *outcome, in surroundings) *cobra.Command {
	var flags reportFlags
	var more checkFlags
	cmd := &cobra.Command{
		Use:                   "watch JOB [flags]",
		Short:                 "check a job again each time it is saved",
		Long:                  watchLong,
		Example:               "  arrestcheck watch job.toml\n  arrestcheck watch --limits site.toml job.toml",
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file"),
		RunE: func(cmd *cobra.Command, names []string) error {
			return watch(cmd.Context(), names[0], &flags, &more, in)
		},
	}
	flags.shown(cmd)
	cmd.Flags().StringArrayVar(&more.limits, "limits", nil, "a limit `FILE` for the job; may be repeated")
	cmd.Flags().StringArrayVar(&more.sets, setFlag, nil, "put `KEY=VALUE` into the job; may be repeated")
	return cmd
}

// shown adds the flags of a report that is only shown.
func (f *reportFlags) shown(cmd *cobra.Command) {
	f.format, f.units, f.color = oneOf("text"), oneOf("both", "si", "us"), oneOf("auto", "always", "never")
	f.fileFlags.flags = cmd.Flags()
	cmd.Flags().Var(&f.units, "units", "units of the text")
	cmd.Flags().BoolVar(&f.ascii, "ascii", false, "plain ASCII text")
	cmd.Flags().Var(&f.color, "color", "colour; auto: on a terminal")
}

// watch shows the job until it is interrupted.
func watch(ctx context.Context, name string, flags *reportFlags, more *checkFlags, in surroundings) error {
	terminal, ok := in.stdout.(*os.File)
	switch {
	case name == "-":
		return &usageError{"watch: - stands for standard input, which is not saved again", "name a job file"}
	case !ok || !isatty.IsTerminal(terminal.Fd()):
		return &usageError{"watch: standard output is no terminal", "once, into a pipe or file: " + programName + " check " + name}
	}
	overrides, err := overrides(more.sets)
	if err != nil {
		return err
	}
	look := func() ([]byte, []string) {
		var o outcome
		sheets, _, err := read([]string{name}, more.limits, overrides, in, &o)
		files := append([]string{name}, more.limits...)
		if err != nil {
			return []byte(describe(flatten(err))), files
		}
		for i := range sheets[0].File.Sets {
			if set := sheets[0].File.Sets[i].Name; set != "" && !slices.Contains(files, set) {
				files = append(files, filepath.Join(filepath.Dir(name), set))
			}
		}
		assess(&sheets[0])
		var b bytes.Buffer
		_ = flags.write(&b, reportgen.Watched(&sheets[0], flags.unitChoice()), in) // a buffer does not fail
		return b.Bytes(), files
	}
	s := screen{out: terminal, size: func() (int, int) {
		columns, rows, err := term.GetSize(int(terminal.Fd()))
		if err != nil {
			return 80, 24
		}
		return columns, rows
	}}
	return follow(ctx, look, s.show)
}

// follow looks at once, and again after each change of the files that the last
// look named; what it sees it shows. It ends with ctx.
func follow(ctx context.Context, look func() (text []byte, files []string), show func([]byte) error) error {
	w, err := fsnotify.NewWatcher()
	if err != nil {
		return &fileError{"watch", "the folder", err}
	}
	defer w.Close()
	settled := time.NewTimer(0)
	var files []string
	for {
		select {
		case <-ctx.Done():
			return ctx.Err()
		case err := <-w.Errors:
			return &fileError{"watch", "the folder", err}
		case event := <-w.Events:
			if slices.ContainsFunc(files, func(f string) bool { return sameName(f, event.Name) }) {
				settled.Reset(settleTime)
			}
		case <-settled.C:
			var text []byte
			text, files = look()
			if err := watchFolders(w, files); err != nil {
				return err
			}
			if err := show(text); err != nil {
				return &fileError{"write", "standard output", err}
			}
		}
	}
}

// watchFolders watches the folders of files: an editor puts a new file in the
// place of the old one, which a watch on the file itself would lose.
func watchFolders(w *fsnotify.Watcher, files []string) error {
	for _, f := range files {
		folder := filepath.Dir(f)
		if err := w.Add(folder); err != nil && !errors.Is(err, fs.ErrNotExist) {
			return &fileError{"watch", fmt.Sprintf("%q", folder), err}
		}
	}
	return nil
}

// sameName reports whether two names, each with the folder as it was asked for,
// are one.
func sameName(a, b string) bool { return filepath.Clean(a) == filepath.Clean(b) }

// A screen is the terminal on which a job is watched.
type screen struct {
	out   io.Writer
	size  func() (columns, rows int)
	shown int
}

// show writes a text over the last one, as far as it has room.
func (s *screen) show(text []byte) error {
	s.shown++
	columns, rows := s.size()
	lines := strings.Split(strings.TrimRight(string(text), "\n"), "\n")
	room := max(rows-2, 4)
	status := fmt.Sprintf("seen %d times; Ctrl-C ends", s.shown)
	if len(lines) > room {
		status = fmt.Sprintf("%d more lines, warnings among them (%s check has all); ", len(lines)-room, programName) + status
		lines = lines[:room]
	}
	var b bytes.Buffer
	b.WriteString(home)
	for _, l := range lines {
		b.WriteString(l + clearLine + "\r\n")
	}
	b.WriteString(clearRest)
	b.WriteString(clip(status, columns-1) + "\r\n")
	_, err := s.out.Write(b.Bytes())
	return err
}

// What moves about on a terminal.
const (
	home      = "\x1b[H"
	clearLine = "\x1b[K"
	clearRest = "\x1b[J"
)

// clip cuts a text to a number of characters.
func clip(s string, most int) string {
	if r := []rune(s); len(r) > most {
		return string(r[:max(most, 0)])
	}
	return s
}
