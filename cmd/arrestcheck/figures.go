package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/reportgen"
)

// figureList is --figure where it draws a job: KIND, or KIND=FILE, repeatable.
type figureList struct {
	texts []string
	kinds []string       // of the figures that have a file
	files []*destination // one for each
}

func (l *figureList) add(cmd *cobra.Command, f *reportFlags) {
	cmd.Flags().StringArrayVar(&l.texts, figureFlag, nil, "draw `KIND=FILE`, a new SVG file, or KIND in the report; repeatable")
	_ = cmd.RegisterFlagCompletionFunc(figureFlag, func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
		return reportgen.FigureKinds(), cobra.ShellCompDirectiveNoSpace
	})
	f.repeated(figureFlag)
}

// parse tells files from figures of the report and hands both to the flags. It
// refuses what cannot go together.
func (l *figureList) parse(f *reportFlags, explains bool, names []string) error {
	var faults []error
	for _, text := range l.texts {
		kind, path, named := strings.Cut(text, "=")
		if !slices.Contains(reportgen.FigureKinds(), kind) {
			faults = append(faults, noSuchName(figureFlag, kind, "kind of figure", reportgen.FigureKinds()))
			continue
		}
		if named {
			l.kinds, l.files = append(l.kinds, kind), append(l.files, &destination{figureFlag, path, f.force})
		} else {
			f.drawn = append(f.drawn, kind)
		}
	}
	f.more = l.files
	if len(l.files) > 0 && len(names) > 1 {
		faults = append(faults, &usageError{fmt.Sprintf("--figure KIND=FILE with %d job files", len(names)), "name one job"})
	}
	if len(f.drawn) > 0 {
		hint := "write it to a file: --" + figureFlag + " " + f.drawn[0] + "=FILE"
		switch {
		case f.format.word == "json":
			faults = append(faults, &usageError{"--figure " + f.drawn[0] + " with --format json", hint})
		case explains:
			faults = append(faults, &usageError{"--figure " + f.drawn[0] + " with --explain", hint})
		}
	}
	return errors.Join(faults...)
}

// draw hands the figures over that have files.
func (l *figureList) draw(s *reportgen.Sheet, u reportgen.UnitChoice, o *outcome) error {
	for i, kind := range l.kinds {
		scene, err := reportgen.Figure(kind, s, u)
		if err != nil {
			return noFigure(kind, s, err)
		}
		o.deliver(l.files[i], scene.SVG(kind))
	}
	return nil
}

// noFigure says why a job has no figure of a kind.
func noFigure(kind string, s *reportgen.Sheet, err error) error {
	var none *reportgen.NoFigure
	if errors.As(err, &none) {
		return &usageError{fmt.Sprintf("--figure %s: %q %s", kind, s.File.Name, none.Reason), none.Hint}
	}
	return fmt.Errorf("internal error: %w", err)
}
