package reportgen

import (
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// wrongMark ends the symbol of a sum that is shown as wrong.
const wrongMark = "_wrong"

// workingBlocks are the working, a formula a block: what it gives, the
// formula, the figures put in, the result.
func (b *builder) workingBlocks() []Block {
	var blocks []Block
	printed := make(map[arrest.Term]string) // figures keep the digits of the line that gave them
	for i := range b.res().Working {
		w := b.sub.working(&b.res().Working[i])
		if strings.HasSuffix(w.Result.Symbol, wrongMark) {
			continue
		}
		_, right, _ := strings.Cut(w.Formula, " = ")
		block := Block{Lines: []Line{{Label: w.Method, Text: w.Meaning + ", " + string(w.Corner) + ":"}, {Text: w.Formula}}}
		if put := substituted(right, w.Terms, printed); put != right {
			block.Lines = append(block.Lines, Line{Text: w.Result.Symbol + " = " + put})
		}
		block.Lines = append(block.Lines, Line{Text: w.Result.Symbol + " = " + b.workingResult(w)})
		printed[w.Result] = termText(w.Result, w.Rounding)
		blocks = append(blocks, block)
	}
	if len(blocks) == 0 {
		return []Block{{Text: noWorking}}
	}
	return blocks
}

// working returns a line of working as it reads on a sheet about this subject:
// nobody works with a tool that falls by itself, and nothing hangs on it.
func (sub subject) working(w *arrest.WorkingLine) *arrest.WorkingLine {
	if sub != aTool || !strings.Contains(w.Formula, workerSymbol) {
		return w
	}
	read := *w
	read.Formula = strings.ReplaceAll(strings.ReplaceAll(w.Formula, toolsTerm, ""), workerSymbol, toolSymbol)
	read.Terms = slices.Clone(w.Terms)
	for i := range read.Terms {
		if read.Terms[i].Symbol == workerSymbol {
			read.Terms[i].Symbol = toolSymbol
		}
	}
	return &read
}

// The symbols of masses in the methods, and that of a tool.
const workerSymbol, toolsTerm, toolSymbol = "m_worker", " + m_tools", "m_tool"

// workingResult returns the result of a line in SI, and in US customary units
// where the sheet shows those.
func (b *builder) workingResult(w *arrest.WorkingLine) string {
	r := w.Result
	text := termText(r, w.Rounding)
	for _, u := range b.d.pair(r.Dimension, quantity.Unit{}, r.SI) {
		if u.System == quantity.Customary && isNumber(r.SI) {
			text += " = " + format(r.SI, u, workingDigits, w.Rounding)
		}
	}
	return text
}

func termText(t arrest.Term, r quantity.Rounding) string {
	return format(t.SI, t.Dimension.SI(), workingDigits, r)
}

// substituted returns the right side of a formula with figures and units, in
// brackets, in the places of its letters: as printed before, if they were.
func substituted(formula string, terms []arrest.Term, printed map[arrest.Term]string) string {
	var out strings.Builder
	for i := 0; i < len(formula); {
		j := i
		for j < len(formula) && isNameByte(formula[j]) {
			j++
		}
		if j == i {
			out.WriteByte(formula[i])
			i++
			continue
		}
		out.WriteString(putIn(formula[i:j], terms, printed))
		i = j
	}
	return out.String()
}

// putIn returns the figure of a letter, or the name itself where it is none: a
// number, sqrt, pi.
func putIn(name string, terms []arrest.Term, printed map[arrest.Term]string) string {
	for _, t := range terms {
		if t.Symbol != name {
			continue
		}
		if text, ok := printed[t]; ok {
			return "(" + text + ")"
		}
		return "(" + termText(t, quantity.Nearest) + ")"
	}
	return name
}

func isNameByte(c byte) bool {
	return c == '_' || '0' <= c && c <= '9' || 'a' <= c && c <= 'z' || 'A' <= c && c <= 'Z'
}

// forgottenBlocks show the sums with body weight forgotten as wrong, with
// their error, beside the right ones.
func (b *builder) forgottenBlocks() []Block {
	var list []Line
	working := b.res().Working
	for i := range working {
		wrong := &working[i]
		name, isWrong := strings.CutSuffix(wrong.Result.Symbol, wrongMark)
		if !isWrong {
			continue
		}
		right := rightLine(working, name, wrong.Corner)
		if right == nil {
			continue
		}
		weight := right.Result.SI - wrong.Result.SI
		share := format(weight/right.Result.SI, mustUnit("%"), pageDigits, quantity.Nearest)
		list = append(list,
			Line{Label: right.Method, Text: b.say(wrongSum, rightSide(wrong.Formula), b.force(wrong.Result.SI), string(wrong.Corner)), Loud: true},
			Line{Text: b.say(rightSum, rightSide(right.Formula), b.force(right.Result.SI))},
			Line{Text: b.say(wrongBy[b.sub], b.force(weight), share)})
	}
	if len(list) == 0 {
		return nil
	}
	return []Block{{Lines: list}}
}

func rightSide(formula string) string {
	_, right, _ := strings.Cut(formula, " = ")
	return right
}

func (b *builder) force(si float64) string {
	return b.d.figure(quantity.Force, si, workingDigits, quantity.Nearest)
}

// rightLine finds the line with this result and corner.
func rightLine(working []arrest.WorkingLine, symbol string, corner arrest.Corner) *arrest.WorkingLine {
	for i := range working {
		if working[i].Result.Symbol == symbol && working[i].Corner == corner {
			return &working[i]
		}
	}
	return nil
}
