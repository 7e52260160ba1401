package limits

import (
	"go/ast"
	"go/parser"
	"go/token"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Every reason with its arguments, once. The figures of a case are those it
// was made from.
func TestReasonArguments(t *testing.T) {
	const peak, mass, fall = arrest.PeakForce, arrest.TotalMass, arrest.FreeFall
	text := arrest.Text
	force := func(si float64, r quantity.Rounding) arrest.Arg { return arrest.Figure(quantity.Force, si, r) }
	length := func(si float64) arrest.Arg { return arrest.Figure(quantity.Length, si, quantity.Nearest) }
	kilograms := func(si float64) arrest.Arg { return arrest.Figure(quantity.Mass, si, quantity.Nearest) }
	plain := limit(t, peak, "8 kN")

	cases := []struct {
		name  string
		res   *arrest.Result
		limit Limit
		want  Reason // among the reasons of the row
	}{
		{"floor", result(floor(peak, 3420, 3500)), plain,
			Reason{OnlyFloor, []arrest.Arg{force(3420, quantity.Down)}}},
		{"ceiling", result(ceiling(peak, 9000)), plain,
			Reason{OnlyCeiling, []arrest.Arg{force(9000, quantity.Up)}}},
		{"band", result(between(peak, 7000, 9000)), plain,
			Reason{Straddles, []arrest.Arg{force(7000, quantity.Nearest), force(9000, quantity.Nearest)}}},
		{"open band", result(between(peak, 7000, inf)), plain,
			Reason{Straddles, []arrest.Arg{force(7000, quantity.Nearest), text("open")}}},
		{"floor and ceiling", result(floor(peak, 7000, 7500), ceiling(peak, 9000)), plain,
			Reason{Straddles, []arrest.Arg{force(7000, quantity.Down), force(9000, quantity.Up)}}},
		{"floor and ceiling, at least", result(floor(arrest.AnchorStrengthPerPerson, 7000, nan), ceiling(arrest.AnchorStrengthPerPerson, 9000)),
			limit(t, arrest.AnchorStrengthPerPerson, "8 kN"),
			Reason{Straddles, []arrest.Arg{force(7000, quantity.Down), force(9000, quantity.Up)}}},
		{"reach", result(floor(peak, 3420, 8100), ceiling(peak, 6000)), plain,
			Reason{FloorReaches, []arrest.Arg{force(8100, quantity.Up)}}},
		{"open reach", result(floor(peak, 3420, inf), ceiling(peak, 6000)), plain,
			Reason{FloorReaches, []arrest.Arg{text("open")}}},
		{"pair", result(between(peak, 8003, 8003)), printed(t, peak, "1800 lbf", "8 kN"),
			Reason{PairDiffers, []arrest.Arg{text("1800 lbf"), text("8 kN")}}},
		{"shape", result(shape(peak, "rising ramp", 6805)), plain,
			Reason{AssumedShape, []arrest.Arg{text("rising ramp")}}},
		{"rating", result(outside(peak, "label of the lanyard")), plain,
			Reason{OutsideRating, []arrest.Arg{text("label of the lanyard")}}},
		{"contradiction", clashing(floor(peak, 7000, 7500), ceiling(peak, 6000)), plain,
			Reason{Contradicted, []arrest.Arg{text("given"), text("rated")}}},

		{"no source", result(using(between(peak, 3000, 4000), 1)), plain,
			Reason{OpenInput, []arrest.Arg{text("worker.tools"), text("no source")}}},
		{"a label settles no stop", result(using(between(peak, 3000, 4000), 2)), plain,
			Reason{OpenInput, []arrest.Arg{text("stop.distance"), text("source does not settle it")}}},
		{"no tolerance", result(using(between(peak, 3000, 4000), 3)), plain,
			Reason{OpenInput, []arrest.Arg{text("fall.free_fall"), text("no tolerance")}}},
		{"two persons", persons(2, result(between(peak, 3000, 4000))), plain,
			Reason{SeveralPersons, []arrest.Arg{text("2")}}},
		{"example", example(result(between(peak, 3000, 4000))), plain, Reason{ID: ExampleValues}},
		{"not checked", result(between(peak, 3000, 4000)), change(plain, func(l *Limit) { l.CheckedOn = "" }),
			Reason{ID: NotChecked}},
		{"superseded", result(between(peak, 3000, 4000)), change(plain, func(l *Limit) { l.SupersededOn = "in May" }),
			Reason{Superseded, []arrest.Arg{text("in May")}}},
		{"product test", result(between(peak, 3000, 4000)), change(plain, func(l *Limit) { l.Kind = ProductTest }),
			Reason{ID: IsProductTest}},

		{"mass above the condition", result(between(peak, 3000, 4000), between(mass, 152, 154)),
			change(plain, func(l *Limit) { l.TotalMassAtMost = bandAt(t, quantity.Mass, "140 kg") }),
			Reason{ConditionUnfulfilled, []arrest.Arg{text("total_mass_at_most"), kilograms(152), text("140 kg")}}},
		{"fall about the condition", result(between(peak, 3000, 4000), between(fall, 1.7, 1.9)),
			change(plain, func(l *Limit) { l.FreeFallAtMost = bandAt(t, quantity.Length, "1.8 m") }),
			Reason{ConditionStraddles, []arrest.Arg{text("free_fall_at_most"), length(1.7), length(1.9), text("1.8 m")}}},
		{"too many persons", persons(2, result(between(peak, 3000, 4000))), change(plain, func(l *Limit) { l.PersonsAtMost = 1 }),
			Reason{ConditionUnfulfilled, []arrest.Arg{text("persons_at_most"), text("2"), text("1")}}},
		{"also beyond", persons(2, result(between(peak, 9000, 9000))), change(plain, func(l *Limit) { l.PersonsAtMost = 1 }),
			Reason{ID: AlsoBeyond}},
		{"model without an allowance", result(bareModel(peak, 4297)), plain, Reason{ID: NoAllowance}},
		{"model stands against a rating", result(bareModel(peak, 9000), ceiling(peak, 6000)), plain, Reason{ID: NoAllowance}},
		{"exhausted", result(modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Exhausted = true })), plain, Reason{ID: DeviceExhausted}},
		{"exhausted, rated governs", result(ceiling(peak, 6000), modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Exhausted = true })), plain, Reason{ID: DeviceExhausted}},
		{"over an edge", result(doubtful(between(peak, 4000, 5000), func(e *arrest.Estimate) { e.Edge = true })), plain, Reason{ID: EdgeContact}},
		{"into an obstacle", result(doubtful(between(peak, 4000, 5000), func(e *arrest.Estimate) { e.Strikes = true })), plain, Reason{ID: BodyStrikes}},
		{"out of the plane", result(doubtful(between(peak, 4000, 5000), func(e *arrest.Estimate) { e.Unreached = true })), plain, Reason{ID: PlaceUnknown}},
		{"beyond the curve", result(modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Beyond = true })), plain, Reason{ID: BeyondModel}},
		{"over an edge", result(between(peak, 3000, 4000), modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Edge = true })), plain, Reason{ID: EdgeContact}},
		{"against something", result(modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Strikes = true })), plain, Reason{ID: BodyStrikes}},
		{"out of any plane", result(modelled(peak, 4000, 0.25, func(e *arrest.Estimate) { e.Unreached = true })), plain, Reason{ID: PlaceUnknown}},
		{"the allowance reaches over", result(modelled(peak, 7000, 0.25, nil)), plain,
			Reason{Straddles, []arrest.Arg{force(5250, quantity.Nearest), force(8750, quantity.Nearest)}}},
		{"nothing computed", result(), plain, Reason{ID: NotComputed}},
		{"nothing to test the condition with", result(between(peak, 3000, 4000)),
			change(plain, func(l *Limit) { l.FreeFallAtMost = bandAt(t, quantity.Length, "1.8 m") }),
			Reason{NotComputed, []arrest.Arg{text("free_fall_at_most")}}},
	}
	seen := map[ReasonID]bool{}
	for _, c := range cases {
		seen[c.want.ID] = true
		f := assess(c.res, c.limit)
		n := slices.IndexFunc(f.Reasons, func(r Reason) bool { return r.ID == c.want.ID })
		if n < 0 {
			t.Errorf("%s: reasons %v, want %s among them", c.name, ids(&f), c.want.ID)
			continue
		}
		if d := cmp.Diff(c.want, f.Reasons[n]); d != "" {
			t.Errorf("%s: %s", c.name, d)
		}
	}
	for _, id := range reasonIDs(t) {
		if !seen[id] {
			t.Errorf("no case gives %s", id)
		}
	}
}

// reasonIDs reads the closed list of reasons from the file that declares it.
func reasonIDs(t *testing.T) []ReasonID {
	t.Helper()
	tree, err := parser.ParseFile(token.NewFileSet(), "finding.go", nil, 0)
	if err != nil {
		t.Fatal(err)
	}
	var list []ReasonID
	ast.Inspect(tree, func(n ast.Node) bool {
		v, ok := n.(*ast.ValueSpec)
		if !ok {
			return true
		}
		if name, ok := v.Type.(*ast.Ident); ok && name.Name == "ReasonID" {
			list = append(list, ReasonID(strings.Trim(v.Values[0].(*ast.BasicLit).Value, `"`)))
		}
		return true
	})
	if len(list) == 0 {
		t.Fatal("finding.go declares no reasons")
	}
	return list
}

func clashing(a, b arrest.Estimate) *arrest.Result {
	res := result(a, b)
	res.Contradictions = []arrest.Contradiction{{A: 0, B: 1}}
	return res
}

func persons(n int, res *arrest.Result) *arrest.Result {
	res.Persons = n
	return res
}

func example(res *arrest.Result) *arrest.Result {
	res.Example = true
	return res
}

func change(l Limit, f func(*Limit)) Limit {
	f(&l)
	return l
}

// modelled is one figure of the model with the user's allowance.
func modelled(q arrest.Quantity, si, allowance float64, change func(*arrest.Estimate)) arrest.Estimate {
	e := by(arrest.Modelled, between(q, si, si))
	e.Allowance = allowance
	if change != nil {
		change(&e)
	}
	return e
}

func bareModel(q arrest.Quantity, si float64) arrest.Estimate { return modelled(q, si, nan, nil) }

// Without an allowance a row from the model is undecided, and its figure is
// shown; with one it is within where nothing else speaks against it.
func TestAllowanceOfTheModel(t *testing.T) {
	plain := limit(t, arrest.PeakForce, "8 kN")
	f := assess(result(floor(arrest.PeakForce, 3000, 3100), bareModel(arrest.PeakForce, 4297)), plain)
	if f.Outcome != Undecided || f.Demand != 4297 || f.Used[0] != 1 || f.Bound != arrest.Between || f.Ratio == f.Ratio {
		t.Errorf("%+v", f)
	}
	f = assess(result(modelled(arrest.PeakForce, 4297, 0.25, nil)), plain)
	if f.Outcome != Within || f.Demand != 4297*1.25 {
		t.Errorf("%+v", f)
	}
	f = assess(result(bareModel(arrest.PeakForce, 12000)), plain)
	if f.Outcome != Undecided {
		t.Errorf("a model without an allowance shows nothing exceeded: %+v", f)
	}
	f = assess(result(modelled(arrest.PeakForce, 12000, 0.25, nil)), plain)
	if f.Outcome != Exceeded {
		t.Errorf("9 kN at least, whatever the model errs: %+v", f)
	}
}

func doubtful(e arrest.Estimate, change func(*arrest.Estimate)) arrest.Estimate {
	change(&e)
	return e
}
