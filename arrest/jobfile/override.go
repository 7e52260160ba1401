package jobfile

import (
	"slices"
	"strconv"
	"strings"
)

// An Override puts a figure or word in the place of one in a job file, or adds
// one: {"rated[1].total_mass", "59 kg .. 120 kg"}. Key is a key of the table as
// messages name it, [[sections]] and lists counted from 1; Value is the text
// without quotes.
type Override struct{ Key, Value string }

// A Change is what an Override did.
type Change struct {
	Override
	Former string // what the file says; empty where it says nothing
}

// String returns the override as it is typed on a command line.
func (o Override) String() string { return "--set " + o.Key + "=" + short(o.Value) }

// A target is the place of a key in the decoded file.
type target struct {
	key    *Key
	path   string // the dotted key by which the file's messages name it
	keys   map[string]any
	list   []any // in place of keys for an element of a list, which is the nth
	n      int
	former any
}

// override puts the overrides into the decoded file, before it is looked at.
func (pg *page) override(top map[string]any, overrides []Override) (changes []Change) {
	for _, o := range overrides {
		to, reason, hint := pg.aim(top, o)
		if reason == "" && pg.isSet(to.path) {
			reason, hint = "the key is set twice", "take out: one of the two"
		}
		if reason != "" {
			pg.fault("", o.String(), "", reason, hint)
			continue
		}
		changes = append(changes, Change{o, pg.former(to)})
		to.put(o.Value)
		if pg.sets == nil {
			pg.sets = map[string]Override{}
		}
		pg.sets[to.path] = o
	}
	return changes
}

// isSet reports whether an Override has put the value of a key.
func (pg *page) isSet(path string) bool {
	_, is := pg.sets[path]
	return is
}

const setHint = "write: --set 'worker.mass=95 kg ± 2 kg'"

// aim finds the place of an override. Sections that are not there are made.
func (pg *page) aim(top map[string]any, o Override) (to target, reason, hint string) {
	steps, ok := split(o.Key)
	switch {
	case !ok:
		return to, "a key is names joined with points, each with or without its number in square brackets", setHint
	case strings.TrimSpace(o.Value) == "":
		return to, "nothing stands after the =", setHint
	}
	g, keys, path := pg.groups[""], top, ""
	if k := g.named[steps[0].name]; k != nil && (k.Kind == Section || k.Kind == Sections) {
		if k.Fixed {
			return to, k.line() + " is written in the file only", "write: it in the file"
		}
		keys, path, reason, hint = enter(k, steps[0], top)
		if reason != "" {
			return to, reason, hint
		}
		if len(steps) == 1 {
			return to, "this is a section; a key in it is asked for", "write: --set '" + o.Key + "." + pg.groups[k.Name].keys[0].Name + "=...'"
		}
		g, steps = pg.groups[k.Name], steps[1:]
	}
	return pg.land(g, keys, path, steps)
}

// land finds the key in its section.
func (pg *page) land(g *group, keys map[string]any, path string, steps []step) (to target, reason, hint string) {
	s := steps[0]
	k := g.named[s.name]
	if k == nil {
		reason, hint = pg.noSuchKey(g, path, steps)
		return to, reason, hint
	}
	to = target{key: k, path: join(path, s.name), keys: keys, former: keys[s.name]}
	inside := s.n > 0 || len(steps) > 1
	switch {
	case k.Fixed:
		return to, to.path + " is written in the file only", "write: it in the file"
	case inside && k.Kind == Velocity:
		return to.component(pg, steps)
	case inside:
		return to, "nothing more stands behind " + to.path, "write: --set '" + to.path + "=...'"
	}
	return to, "", ""
}

// component finds one component, or the speed or direction, of a velocity.
func (to target) component(pg *page, steps []step) (_ target, reason, hint string) {
	s := steps[0]
	if s.n > 0 && len(steps) == 1 {
		list := listOf(to.former)
		if s.n > len(list) {
			return to, to.path + " has no element of this number in the file", "write: the components in the file"
		}
		to.keys[s.name] = list
		to.path, to.list, to.n, to.former = element(to.path, s.n-1), list, s.n-1, list[s.n-1]
		return to, "", ""
	}
	polar, isPolar := to.former.(map[string]any)
	last := steps[len(steps)-1]
	k := pg.groups[Polar].named[last.name]
	if !isPolar || len(steps) > 2 || s.n > 0 || last.n > 0 || k == nil {
		return to, to.path + " is not written in this way in the file", "write: --set '" + to.path + "=...', or the velocity in the file"
	}
	return target{key: k, path: join(to.path, k.Name), keys: polar, former: polar[k.Name]}, "", ""
}

// listOf returns the elements of a list, each of which can be replaced.
func listOf(v any) []any {
	list, _ := v.([]any)
	list = slices.Clone(list)
	if tables, are := v.([]map[string]any); are {
		for _, keys := range tables {
			list = append(list, keys)
		}
	}
	return list
}

// enter goes into a section, which is made where it is not there.
func enter(k *Key, s step, top map[string]any) (keys map[string]any, path, reason, hint string) {
	switch v := top[k.Name].(type) {
	case []map[string]any:
		switch {
		case s.n > 0 && s.n <= len(v):
			return v[s.n-1], element(k.Name, s.n-1), "", ""
		case s.n == 0 && k.Several && len(v) == 1:
			return v[0], element(k.Name, 0), "", ""
		case s.n == 0:
			return nil, "", "which [[" + k.Name + "]] is meant, of " + count(len(v), "section") + "?", "write: --set '" + element(k.Name, 0) + "...'"
		}
		return nil, "", "there is no [[" + k.Name + "]] of this number in the file", "write: the section in the file"
	case map[string]any:
		if s.n > 0 {
			return nil, "", "[" + k.Name + "] stands once, without a number", "write: --set '" + k.Name + "...'"
		}
		return v, k.Name, "", ""
	case nil:
		if k.Kind == Section && s.n == 0 {
			keys = map[string]any{}
			top[k.Name] = keys
			return keys, k.Name, "", ""
		}
		return nil, "", "there is no [[" + k.Name + "]] of this number in the file", "write: the section in the file"
	}
	return nil, "", k.Name + " is no section in the file", "write: the section in the file"
}

// noSuchKey says what is wrong with a name that no key of the section has.
func (pg *page) noSuchKey(g *group, path string, steps []step) (reason, hint string) {
	name, rest := steps[0].name, ""
	for _, s := range steps[1:] {
		rest += "." + s.name
	}
	names := make([]string, 0, len(g.keys))
	for _, k := range g.keys {
		if !k.Fixed {
			names = append(names, k.Name)
		}
	}
	near, ok := sameLetters(name, names)
	if !ok {
		near, ok = nearest(name, names)
	}
	if ok {
		return "no such key", "write: --set '" + join(path, near) + rest + "=...'   (if that is what was meant)"
	}
	if right := pg.settable(name, rest); len(right) > 0 {
		return pg.noPlace(path), "write: " + strings.Join(right, or)
	}
	return "no such key", "write: one of " + strings.Join(names, ", ")
}

// settable lists the overrides of a name in the sections of the file in which
// it has a place, or in all there are where the file has none of them.
func (pg *page) settable(name, rest string) []string {
	var right, here []string
	for _, section := range pg.groups.find(name) {
		k := pg.groups[section].named[name]
		if section == "" || section == Entry || section == Polar || k.Fixed {
			continue
		}
		place := section
		if pg.groups[""].named[section].Kind == Sections {
			place = element(section, 0)
		}
		right = append(right, "--set '"+place+"."+name+rest+"=...'")
		if pg.line(place) > 0 {
			here = append(here, right[len(right)-1])
		}
	}
	if len(here) > 0 {
		return here
	}
	return right
}

// noPlace says that a name has its place elsewhere.
func (pg *page) noPlace(path string) string {
	if path == "" {
		return "no such key at the top of the file"
	}
	return "no such key in " + path + "; it belongs in another section"
}

// former is what the file says in the place of an override, figures without
// their source.
func (pg *page) former(to target) string {
	switch v := to.former.(type) {
	case nil:
		return ""
	case string:
		return v
	case map[string]any:
		if text, ok := v["value"].(string); ok {
			return text
		}
		return pg.formerList(to.path, []any{v["speed"], v["direction"]})
	case []any:
		return pg.formerList(to.path, v)
	case []map[string]any:
		return pg.formerList(to.path, listOf(v))
	default:
		text, _ := pg.written(to.path, v)
		return text
	}
}

// formerList is what the file says in a list.
func (pg *page) formerList(path string, list []any) string {
	texts := make([]string, len(list))
	for i, v := range list {
		texts[i] = pg.former(target{path: element(path, i), former: v})
	}
	return strings.Join(texts, ", ")
}

// put writes the value as the kind of the key asks for it; what is not of the
// kind is left as text, which is refused where the key is read.
func (to target) put(text string) {
	var v any = text
	switch to.key.Kind {
	case Integer:
		if n, err := strconv.ParseInt(text, 10, 64); err == nil {
			v = n
		}
	case Boolean:
		if text == "true" || text == "false" {
			v = text == "true"
		}
	}
	if to.list != nil {
		to.list[to.n] = v
	} else {
		to.keys[to.key.Name] = v
	}
}

// A step is one part of a dotted key, with its number, 0 where it has none.
type step struct {
	name string
	n    int
}

// split takes a dotted key apart.
func split(key string) (steps []step, ok bool) {
	for part := range strings.SplitSeq(key, ".") {
		name, number, numbered := strings.Cut(part, "[")
		s := step{name: name}
		if numbered {
			digits, closed := strings.CutSuffix(number, "]")
			n, err := strconv.Atoi(digits)
			if !closed || err != nil || n < 1 || strings.Trim(digits, "0123456789") != "" {
				return nil, false
			}
			s.n = n
		}
		if name == "" || strings.ContainsFunc(name, quoted) {
			return nil, false
		}
		steps = append(steps, s)
	}
	return steps, len(steps) <= 3
}

// blame turns the fault of a value that an Override has put into one of the
// override: the next action is typed on the command line.
func (f *Fault) blame(o Override, name string) {
	f.Key = o.String()
	lines := strings.Split(f.Hint, "\n")
	for i, line := range lines {
		lines[i] = setLine(line, name, o.Key)
	}
	f.Hint = strings.Join(lines, "\n")
}

// setLine replaces name = "figure" by --set 'key=figure'.
func setLine(line, name, key string) string {
	var b strings.Builder
	for {
		before, after, found := strings.Cut(line, name+" = ")
		b.WriteString(before)
		if !found {
			return b.String()
		}
		value := after
		if quoted, err := strconv.QuotedPrefix(after); err == nil {
			value = quoted
		} else if i := strings.IndexByte(after, ' '); i >= 0 {
			value = after[:i]
		}
		line = after[len(value):]
		b.WriteString("--set '" + key + "=" + strings.Trim(value, `"`) + "'")
	}
}

// setBy returns the override that has put the value of a key, or of what is
// around it.
func (pg *page) setBy(key string) (o Override, name string, is bool) {
	for ; key != "" && len(pg.sets) > 0; key = parent(key) {
		if o, is = pg.sets[key]; is {
			name = key[strings.LastIndexByte(key, '.')+1:]
			return o, name, true
		}
	}
	return o, "", false
}
