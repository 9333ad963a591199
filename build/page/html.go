package page

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
)

// required are the placeholders without which a page cannot work.
var required = []string{"main", "style"}

var placeholder = regexp.MustCompile(`\{\{([^{}]*)\}\}`)

// fill replaces each {{name}} in a template by its value.
func fill(template string, values map[string]string) (string, error) {
	var used []string
	var unknown []string
	out := placeholder.ReplaceAllStringFunc(template, func(found string) string {
		name := strings.TrimSpace(strings.Trim(found, "{}"))
		value, ok := values[name]
		if !ok {
			unknown = append(unknown, found)
		}
		used = append(used, name)
		return value
	})
	if len(unknown) > 0 {
		return "", fmt.Errorf("unknown placeholder %s; those known are main, style, worker, wasm and build", strings.Join(unknown, ", "))
	}
	for _, name := range required {
		if !slices.Contains(used, name) {
			return "", fmt.Errorf("the placeholder {{%s}} is missing", name)
		}
	}
	return out, nil
}
