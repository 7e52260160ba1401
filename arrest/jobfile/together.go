package jobfile

import (
	"slices"
	"strconv"
	"strings"
)

// anyOf records that none of the keys is there of which the section needs one.
func (t *table) anyOf(k *Key) {
	if len(k.AnyOf) == 0 || slices.ContainsFunc(k.AnyOf, t.has) {
		return
	}
	for _, name := range k.AnyOf {
		if slices.Contains(t.meant, name) {
			return
		}
	}
	var right []string
	for _, name := range k.AnyOf {
		right = append(right, t.group.named[name].line())
	}
	reason := "at least one of these keys has to be there: " + strings.Join(k.AnyOf, ", ")
	if t.has("shape") {
		reason = "shape says how the force runs, not how far or how long; " + reason
	}
	t.page.fault(t.path, t.path, "", reason, "write: "+strings.Join(right, or))
}

// together records which keys of the section cannot stand as they do: one
// without its companion, beside another that excludes it, beside a word that
// has no use for it.
func (t *table) together() {
	for _, k := range t.group.keys {
		if len(k.Variants) > 0 {
			t.variant(k)
		}
	}
	for _, k := range t.group.keys {
		if len(k.Either) > 0 && k.Either[0] == k.Name {
			t.either(k)
		}
		if len(k.With) > 0 && k.With[0] == k.Name {
			t.with(k)
		}
		if t.has(k.Name) {
			t.not(k)
		}
		if k.Beside.Name != "" && !slices.Contains(t.useless, k.Name) {
			t.beside(k)
		}
	}
}

// either records that not exactly one of some keys is there.
func (t *table) either(k *Key) {
	var there, open []string
	for _, name := range k.Either {
		switch {
		case t.has(name):
			there = append(there, name)
		case slices.Contains(t.meant, name):
			return
		case !t.excluded(name):
			open = append(open, name)
		}
	}
	switch {
	case len(there) == 0 && k.Unless != "" && (t.has(k.Unless) || slices.Contains(t.meant, k.Unless)):
	case len(there) == 0:
		if k.Unless != "" && !t.excluded(k.Unless) {
			open = append(open, k.Unless)
		}
		t.noneOf(open)
	case len(there) > 1:
		for _, name := range there[1:] {
			t.fault(name, "", "it cannot stand beside "+t.called(there[0])+": of "+t.calledAll(k.Either, " and ")+" exactly one is asked for",
				"take out: "+t.called(there[0])+", or "+t.called(name))
		}
	}
}

// excluded reports whether a key that is there leaves no room for another.
func (t *table) excluded(name string) bool {
	return slices.ContainsFunc(t.group.keys, func(k *Key) bool {
		return t.has(k.Name) && (slices.Contains(k.Not, name) || slices.Contains(k.Either, name))
	})
}

// noneOf records that none of some keys is there of which one has to be.
func (t *table) noneOf(names []string) {
	first := t.group.named[names[0]]
	if first.Kind == Section {
		reason := "the section is missing"
		if len(names) > 1 {
			reason += "; " + t.calledAll(names[1:], " or ") + " can stand in its place"
		}
		t.page.fault("", "["+first.Name+"]", "", reason, t.page.groups.sectionHint(first))
		return
	}
	var right []string
	for _, name := range names {
		right = append(right, t.group.named[name].line())
	}
	t.page.fault(t.path, t.path, "", "exactly one of these keys has to be there: "+strings.Join(names, ", "), "write: "+strings.Join(right, or))
}

// with records that some of the keys are there that stand together, and some
// are not.
func (t *table) with(k *Key) {
	var there, missing, right []string
	for _, name := range k.With {
		switch {
		case t.has(name):
			there = append(there, t.key(name))
		case !slices.Contains(t.meant, name):
			missing = append(missing, name)
			right = append(right, t.group.named[name].line())
		}
	}
	if len(there) == 0 || len(missing) == 0 {
		return
	}
	t.page.fault(there[0], there[0], "", "it stands only together with "+enumerate(missing, " and "),
		"write: "+strings.Join(right, "\n       ")+or+"take out "+enumerate(there, " and "))
}

// not records the keys that cannot stand beside k, which is there.
func (t *table) not(k *Key) {
	for _, name := range k.Not {
		if t.has(name) {
			t.fault(name, "", "it cannot stand beside "+t.called(k.Name), "take out: "+t.called(name)+", or "+t.called(k.Name))
		}
	}
}

// called names a key of the table, a section by its heading.
func (t *table) called(name string) string {
	if k := t.group.named[name]; k.Kind == Section || k.Kind == Sections {
		return k.line()
	}
	return t.key(name)
}

func (t *table) calledAll(names []string, last string) string {
	all := make([]string, len(names))
	for i, name := range names {
		all[i] = t.called(name)
	}
	return enumerate(all, last)
}

// enumerate joins words with commas, and the last two with a word.
func enumerate(words []string, last string) string {
	n := len(words)
	if n < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:n-1], ", ") + last + words[n-1]
}

// beside records that k stands without its companion, or that the word of the
// companion asks for k and it is not there.
func (t *table) beside(k *Key) {
	word, _ := t.keys[k.Beside.Name].(string)
	there := t.has(k.Beside.Name) && (k.Beside.Choice == "" || word == k.Beside.Choice)
	switch {
	case t.has(k.Name) && !there:
		t.alone(k)
	case !t.has(k.Name) && there && k.Beside.Choice != "" && !slices.Contains(t.meant, k.Name):
		t.fault(k.Beside.Name, word, "it asks for "+t.key(k.Name)+": "+k.Help, k.hint())
	}
}

// alone records a key that stands without its companion.
func (t *table) alone(k *Key) {
	c := t.group.named[k.Beside.Name]
	if slices.Contains(t.meant, c.Name) {
		return
	}
	partner, right := t.called(c.Name), c.lines()
	if c.Kind == Section || c.Kind == Sections {
		right = strings.TrimPrefix(t.page.groups.sectionHint(c), "write: ")
	}
	if k.Beside.Choice != "" {
		right = c.Name + " = " + strconv.Quote(k.Beside.Choice)
		partner = t.path + "." + right
	}
	t.fault(k.Name, "", "it stands only beside "+partner, "write: "+right+or+"take out "+t.called(k.Name))
}

// variant records the keys that have no place beside the word of k, and those
// that the word asks for.
func (t *table) variant(k *Key) {
	word, _ := t.keys[k.Name].(string)
	at := slices.IndexFunc(k.Variants, func(v Variant) bool { return v.Word == word })
	if at < 0 {
		return
	}
	v := &k.Variants[at]
	for _, other := range t.group.keys {
		if t.has(other.Name) && !v.takes(other.Name) && k.decides(other.Name) {
			t.useless = append(t.useless, other.Name)
			t.fault(other.Name, "", t.key(k.Name)+" = "+strconv.Quote(word)+" has no use for it"+v.beside(),
				"take out: "+t.key(other.Name)+or+"write "+k.belongs(other.Name))
		}
	}
	for _, need := range v.Needs {
		t.need(k, word, need)
	}
}

// need records that not exactly one of the keys is there that a word needs.
func (t *table) need(k *Key, word string, names []string) {
	var there, right []string
	for _, name := range names {
		if slices.Contains(t.meant, name) {
			return
		}
		if t.has(name) {
			there = append(there, name)
		}
		right = append(right, t.needLines(name))
	}
	switch {
	case len(there) == 0 && len(names) == 1:
		t.fault(k.Name, word, "it asks for "+t.key(names[0])+": "+t.group.named[names[0]].Help, "write: "+right[0])
	case len(there) == 0:
		t.fault(k.Name, word, "it asks for exactly one of "+strings.Join(names, ", "), "write: "+strings.Join(right, or))
	case len(there) > 1:
		for _, name := range there[1:] {
			t.fault(name, "", "it says in another way what "+t.key(there[0])+" says; exactly one of the two is asked for",
				"take out: "+t.key(there[0])+", or "+t.key(name))
		}
	}
}

// needLines is a key as it is typed, with the companion it has to have.
func (t *table) needLines(name string) string {
	k := t.group.named[name]
	if c := k.Beside.Name; c != "" && !t.has(c) {
		return t.group.named[c].line() + "\n       " + k.line()
	}
	return k.line()
}

// takes reports whether the key may stand beside the word.
func (v *Variant) takes(name string) bool { return slices.Contains(v.all(), name) }

// beside says what can stand beside the word, nothing where no key can.
func (v *Variant) beside() string {
	if len(v.all()) == 0 {
		return ""
	}
	return "; beside it can stand " + enumerate(v.all(), " and ")
}

// all lists the keys that may stand beside the word.
func (v *Variant) all() []string { return append(slices.Concat(v.Needs...), v.May...) }

// decides reports whether it hangs on the word of k that a key may be there.
func (k *Key) decides(name string) bool {
	return slices.ContainsFunc(k.Variants, func(v Variant) bool { return v.takes(name) })
}

// belongs is the next action that makes a key right: the words it goes with.
func (k *Key) belongs(name string) string {
	var words []string
	for i := range k.Variants {
		if v := &k.Variants[i]; v.takes(name) {
			words = append(words, strconv.Quote(v.Word))
		}
	}
	return k.Name + " = " + enumerate(words, " or ")
}
