package reportgen

import (
	"go/ast"
	"go/parser"
	"go/token"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// forbidden are the words that no output holds: each could be read as leave to
// work.
var forbidden = regexp.MustCompile(`(?i)\b(safe|safely|pass|passes|passed|ok|okay|compliant|compliance|approved|adequate|sufficient|acceptable|allowable|permitted|harmless|verified|guaranteed|conservative|met)\b|[✓✔☑✅]`)

func TestForbiddenFindsWords(t *testing.T) {
	for s, want := range map[string]bool{
		"Not a permission to work": false, "metal, method": false, "unsafe": false,
		"It is SAFE.": true, "all ok": true, "limits met": true, "✓": true,
	} {
		if got := forbidden.MatchString(s); got != want {
			t.Errorf("%q: %t, want %t", s, got, want)
		}
	}
}

// Every string literal of the sources of this package is looked at, so that no
// sentence escapes by standing elsewhere.
func TestNoForbiddenWord(t *testing.T) {
	n := 0
	eachLiteral(t, ".", func(where, s string) {
		n++
		if w := forbidden.FindString(s); w != "" {
			t.Errorf("%s: %q in %q", where, w, s)
		}
	})
	if n < 300 {
		t.Fatalf("only %d literals seen", n)
	}
	for _, m := range arrest.Methods() {
		for _, s := range []string{m.Title, m.Valid, m.Errs, m.Source} {
			if w := forbidden.FindString(s); w != "" {
				t.Errorf("%s: %q in %q", m.ID, w, s)
			}
		}
	}
}

// Sentences are in the files named wording: a literal elsewhere has fewer than
// four words. The schema describes the form of the JSON and no job.
func TestSentencesAreInOnePlace(t *testing.T) {
	eachLiteral(t, ".", func(where, s string) {
		if strings.HasPrefix(where, "wording") || strings.HasPrefix(where, "schema.go") || strings.HasPrefix(s, "reportgen: ") || strings.Contains(s, `json:"`) {
			return
		}
		if len(strings.Fields(s)) > 3 {
			t.Errorf("%s: %q", where, s)
		}
	})
}

func eachLiteral(t *testing.T, folder string, visit func(where, s string)) {
	t.Helper()
	files := token.NewFileSet()
	for _, f := range parsed(t, files, folder) {
		ast.Inspect(f, func(n ast.Node) bool {
			lit, ok := n.(*ast.BasicLit)
			if !ok || lit.Kind != token.STRING {
				return true
			}
			s, err := strconv.Unquote(lit.Value)
			if err != nil {
				t.Fatal(err)
			}
			visit(files.Position(lit.Pos()).String(), s)
			return true
		})
	}
}

// parsed returns the files of a folder, tests left out.
func parsed(t *testing.T, files *token.FileSet, folder string) []*ast.File {
	t.Helper()
	var list []*ast.File
	for _, path := range goFiles(t, folder) {
		if strings.HasSuffix(path, "_test.go") {
			continue
		}
		f, err := parser.ParseFile(files, path, nil, parser.ParseComments)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, f)
	}
	return list
}

// constants returns the values of the string constants of a type, so that an
// id that is added without words is noticed.
func constants(t *testing.T, folder, typeName string) []string {
	t.Helper()
	var list []string
	for _, f := range parsed(t, token.NewFileSet(), folder) {
		ast.Inspect(f, func(n ast.Node) bool {
			spec, ok := n.(*ast.ValueSpec)
			if !ok {
				return true
			}
			if id, ok := spec.Type.(*ast.Ident); ok && id.Name == typeName {
				for _, v := range spec.Values {
					if lit, ok := v.(*ast.BasicLit); ok {
						s, _ := strconv.Unquote(lit.Value)
						list = append(list, s)
					}
				}
			}
			return true
		})
	}
	if len(list) == 0 {
		t.Fatal("no constants of type ", typeName)
	}
	return list
}

// The number of arguments of each warning, from the comments of the ids.
var warningArguments = map[arrest.WarningID]int{
	arrest.NothingAboutStop: 0, arrest.PartImpossible: 2, arrest.RoutesAgreeClosely: 1, arrest.RatioNearHalf: 1,
	arrest.ForceLate: 2, arrest.ForceEarly: 2, arrest.RatioUndecided: 2, arrest.FloorIllConditioned: 2,
	arrest.ShapeContradicted: 5, arrest.ShapeAssumed: 1, arrest.RatingMassOutside: 5, arrest.RatingFallOutside: 3,
	arrest.RatingSpeedCounted: 2, arrest.RatingContradicted: 3, arrest.EstimatesDisjoint: 5, arrest.CeilingBelowFloor: 3,
	arrest.Unusual: 4, arrest.SeveralPersons: 1, arrest.GravityStated: 1, arrest.DragLeftOut: 1,
	arrest.ExampleValues: 0, arrest.MeansAreNotPeaks: 0,
	arrest.PathExhausted: 3, arrest.PathRigid: 0, arrest.PathBeyondCurve: 1, arrest.StaticStretchOnly: 1,
	arrest.SeveralAbsorbers: 1, arrest.AbsorberOnRetractable: 1, arrest.NothingAbsorbs: 1, arrest.NoAllowanceEntered: 0,
	arrest.RatedAgainstModel: 4, arrest.LedgersClose: 2, arrest.NoMiddle: 1, arrest.PathExhaustedInAllowance: 3,
	arrest.LayoutRestrained: 1, arrest.LayoutRestrainedInPart: 1, arrest.LayoutGoneOver: 3, arrest.LayoutShort: 3, arrest.LayoutEdge: 2,
	arrest.LayoutEdgeUnrated: 1, arrest.LayoutAnchorLow: 2, arrest.LayoutOutOfPlane: 1, arrest.LayoutIntoFace: 1,
	arrest.LayoutStrikes: 4, arrest.LayoutStrikesFalling: 3, arrest.LayoutStrikeForce: 3, arrest.LayoutNothingBelow: 0,
	arrest.LayoutNoClearance: 0, arrest.LayoutItemsMissing: 3, arrest.LayoutDatumsApart: 2, arrest.LayoutFeetStanding: 0,
	arrest.LayoutWidthUnknown: 0, arrest.LayoutLaterSwing: 2, arrest.LayoutInextensible: 0,
}

// addedArguments counts what the report itself puts into the sentence of a
// warning: what its comparison with published drops came to, which ends of two
// figures contradict each other, and what a warning says that shares its
// statement with another.
var addedArguments = map[arrest.WarningID]int{
	arrest.NoAllowanceEntered: 4, arrest.EstimatesDisjoint: 2, arrest.LayoutRestrained: 1, arrest.LayoutRestrainedInPart: 1,
	arrest.LayoutNothingBelow: 1, arrest.LayoutNoClearance: 1, arrest.LayoutFeetStanding: 1, arrest.LayoutWidthUnknown: 1,
}

func TestEveryWarningHasWords(t *testing.T) {
	for _, id := range arrest.WarningIDs() {
		want, counted := warningArguments[id]
		st, ok := ofWarnings[id]
		if !counted || !ok {
			t.Errorf("%s: counted %t, worded %t", id, counted, ok)
			continue
		}
		usesAll(t, string(id), st.phrase, want+addedArguments[id])
	}
}

// The number of arguments of each reason, from the comments of the ids.
var reasonArguments = map[limits.ReasonID]int{
	limits.OnlyFloor: 1, limits.OnlyCeiling: 1, limits.Straddles: 2, limits.FloorReaches: 1, limits.PairDiffers: 2,
	limits.AssumedShape: 1, limits.OpenInput: 2, limits.OutsideRating: 1, limits.Contradicted: 2, limits.SeveralPersons: 1,
	limits.ExampleValues: 0, limits.NotChecked: 0, limits.Superseded: 1, limits.IsProductTest: 0,
	limits.ConditionUnfulfilled: 3, limits.ConditionStraddles: 4, limits.AlsoBeyond: 0, limits.NotComputed: 0,
	limits.NoAllowance: 0, limits.DeviceExhausted: 0, limits.BeyondModel: 0,
	limits.EdgeContact: 0, limits.BodyStrikes: 0, limits.PlaceUnknown: 0,
}

func TestEveryReasonHasWords(t *testing.T) {
	for _, id := range constants(t, "../limits", "ReasonID") {
		want, counted := reasonArguments[limits.ReasonID(id)]
		p, ok := reasons[limits.ReasonID(id)]
		if !counted || !ok {
			t.Errorf("%s: counted %t, worded %t", id, counted, ok)
			continue
		}
		usesAll(t, id, p, want)
	}
	usesAll(t, "not_computed with a condition", untestedCondition, 1)
}

func usesAll(t *testing.T, id string, p phrase, n int) {
	t.Helper()
	if len(p.args) != n {
		t.Errorf("%s: %d arguments, want %d", id, len(p.args), n)
	}
	for _, a := range p.args {
		if !strings.Contains(p.text, "{"+a+"}") && !strings.Contains(p.text, "{"+a+" .. ") && !strings.Contains(p.text, " .. "+a+"}") {
			t.Errorf("%s does not use %q", id, a)
		}
	}
}

// Outcomes, senses and open reasons are closed sets with words of their own.
func TestClosedSetsHaveWords(t *testing.T) {
	for _, o := range limits.Outcomes() {
		if outcomeWords[o] == "" {
			t.Errorf("no words for the outcome %s", o)
		}
	}
	for typeName, words := range map[string]map[string]string{"OpenReason": openWords, "Evidence": evidenceWords} {
		for _, id := range constants(t, "../arrest", typeName) {
			if id != "" && words[id] == "" {
				t.Errorf("no words for the %s %q", typeName, id)
			}
		}
	}
	for _, e := range limits.Subjects() {
		if expectedWords[e.Subject] == "" {
			t.Errorf("no words for the subject %s", e.Subject)
		}
	}
}
