package reportgen

import (
	"reflect"
	"strconv"
	"unicode/utf8"
)

// appendJSON appends the JSON of a struct of texts, numbers and lists, as
// encoding/json writes it without escapes for HTML; characters without a shape
// of their own are escaped besides.
//
// It is written by hand as a run of the program writes one document: that
// package first sorts out the fields of every type, which pays for many
// documents and takes longer than the rest of a report for one.
func appendJSON(to []byte, v reflect.Value) []byte {
	switch v.Kind() {
	case reflect.Pointer:
		if v.IsNil() {
			return append(to, "null"...)
		}
		return appendJSON(to, v.Elem())
	case reflect.Struct:
		to, _ = appendFields(append(to, '{'), v, 0)
		return append(to, '}')
	case reflect.Slice:
		if v.IsNil() {
			return append(to, "null"...)
		}
		return appendList(to, v)
	case reflect.Array:
		return appendList(to, v)
	case reflect.String:
		return appendText(to, v.String())
	case reflect.Bool:
		return strconv.AppendBool(to, v.Bool())
	case reflect.Int:
		return strconv.AppendInt(to, v.Int(), 10)
	case reflect.Float64:
		if v.Type() == reflect.TypeFor[figure]() {
			return figure(v.Float()).append(to)
		}
	}
	panic("reportgen: json: a " + v.Type().String()) // a struct of texts and numbers
}

// appendFields appends the fields of a struct, of which written stand before,
// those of an embedded one among them.
func appendFields(to []byte, v reflect.Value, written int) ([]byte, int) {
	t := v.Type()
	for i := range t.NumField() {
		f := t.Field(i)
		name, named := f.Tag.Lookup("json")
		if f.Anonymous && !named {
			to, written = appendFields(to, v.Field(i), written)
			continue
		}
		if !named {
			panic("reportgen: json: " + t.String() + "." + f.Name + " has no key")
		}
		if written > 0 {
			to = append(to, ',')
		}
		to = append(append(append(to, '"'), name...), '"', ':')
		to = appendJSON(to, v.Field(i))
		written++
	}
	return to, written
}

func appendList(to []byte, v reflect.Value) []byte {
	to = append(to, '[')
	for i := range v.Len() {
		if i > 0 {
			to = append(to, ',')
		}
		to = appendJSON(to, v.Index(i))
	}
	return append(to, ']')
}

// appendText appends a text in quotes. What is no UTF-8 becomes U+FFFD.
func appendText(to []byte, s string) []byte {
	to = append(to, '"')
	from := 0 // what stands before it is written
	for i, r := range s {
		if r >= ' ' && r <= '~' && r != '"' && r != '\\' || shown(r) {
			continue
		}
		_, size := utf8.DecodeRuneInString(s[i:])
		to = append(to, s[from:i]...)
		to = appendEscape(to, r)
		from = i + size
	}
	return append(append(to, s[from:]...), '"')
}

// shown reports whether a character beyond ASCII stands in JSON as it is.
func shown(r rune) bool {
	return r > '~' && r != utf8.RuneError && r != noBreakRune && visible(r)
}

func appendEscape(to []byte, r rune) []byte {
	const hex = "0123456789abcdef"
	switch r {
	case '"', '\\':
		return append(to, '\\', byte(r))
	case '\b':
		return append(to, '\\', 'b')
	case '\f':
		return append(to, '\\', 'f')
	case '\n':
		return append(to, '\\', 'n')
	case '\r':
		return append(to, '\\', 'r')
	case '\t':
		return append(to, '\\', 't')
	}
	if r > 0xffff {
		r -= 0x10000
		to = appendEscape(to, 0xd800+r>>10)
		r = 0xdc00 + r&0x3ff
	}
	return append(to, '\\', 'u', hex[r>>12&15], hex[r>>8&15], hex[r>>4&15], hex[r&15])
}
