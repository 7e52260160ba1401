package main

import (
	"errors"
	"fmt"
	"strings"

	"arrestcheck/arrest/jobfile"
)

const setFlag = "set"

// overrides takes the values of --set apart. A figure may hold = itself only
// behind the first one.
func overrides(sets []string) ([]jobfile.Override, error) {
	var all []jobfile.Override
	var faults []error
	for _, text := range sets {
		key, value, found := strings.Cut(text, "=")
		key, value = strings.TrimSpace(key), strings.TrimSpace(value)
		if !found || key == "" {
			faults = append(faults, &usageError{fmt.Sprintf("--set %q is not KEY=VALUE", text),
				"write: --set 'worker.mass=104 kg ± 1 kg'"})
			continue
		}
		all = append(all, jobfile.Override{Key: key, Value: value})
	}
	return all, errors.Join(faults...)
}
