package wording

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// says are the functions that take the code of a sentence, and where.
var says = map[string]int{"NewError": 0, "Say": 0, "find": 0, "fault": 0, "outside": 0, "refuse": 1, "say": 1}

// putTogether are the codes that the sources put together from a beginning and
// what is only known when they run.
var putTogether = map[string][]string{
	"scale-": {"scale-below", "scale-above"},
	"verdict-": {
		"verdict-conforms-min", "verdict-conforms-max", "verdict-conforms-both",
		"verdict-does-not-conform-min", "verdict-does-not-conform-max",
		"verdict-not-proven-min", "verdict-not-proven-max", "verdict-not-proven-both",
		"verdict-conforms-min-simple", "verdict-conforms-max-simple", "verdict-conforms-both-simple",
		"verdict-does-not-conform-min-simple", "verdict-does-not-conform-max-simple",
	},
}

// usage is what the sources say, each with the place where they do.
type usage struct {
	codes      map[string]token.Position // where a code is called for
	beginnings map[string]token.Position // where a code is put together
	literals   map[string]bool           // every text that stands in the sources
}

// A code without a sentence would show as such to the inspector; a sentence
// without a use would be translated for nothing.
func TestEverySentenceIsUsedAndThere(t *testing.T) {
	u := readUsage(t, "..", "../../wasm")
	for code, at := range u.codes {
		if _, ok := byCode[code]; !ok {
			t.Errorf("%s: there is no sentence for %s", at, code)
		}
	}
	for beginning, at := range u.beginnings {
		if putTogether[beginning] == nil {
			t.Errorf("%s: putTogether has to list what %q begins", at, beginning)
		}
	}
	for beginning, codes := range putTogether {
		if _, ok := u.beginnings[beginning]; !ok {
			t.Errorf("nothing is put together with %q", beginning)
		}
		for _, code := range codes {
			if _, ok := byCode[code]; !ok {
				t.Errorf("there is no sentence for %s", code)
			}
			u.literals[code] = true
		}
	}
	for _, s := range All() {
		if !u.literals[s.Code] {
			t.Errorf("the sentence %s is used nowhere", s.Code)
		}
	}
}

// readUsage reads the Go sources in folders and below, but for tests.
func readUsage(t *testing.T, folders ...string) usage {
	t.Helper()
	if _, err := os.Stat(".."); err != nil {
		t.Skipf("the sources are out of reach: %v", err) // in a browser
	}
	u := usage{codes: map[string]token.Position{}, beginnings: map[string]token.Position{}, literals: map[string]bool{}}
	for _, folder := range folders {
		err := filepath.WalkDir(folder, func(path string, _ fs.DirEntry, err error) error {
			if err != nil || filepath.Ext(path) != ".go" || strings.HasSuffix(path, "_test.go") {
				return err
			}
			files := token.NewFileSet()
			file, err := parser.ParseFile(files, path, nil, parser.SkipObjectResolution)
			if err == nil {
				u.note(files, file)
			}
			return err
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	if len(u.codes) == 0 {
		t.Fatal("no code is used anywhere: has a function in says another name by now?")
	}
	return u
}

// note notes what a source says.
func (u usage) note(files *token.FileSet, file *ast.File) {
	ast.Inspect(file, func(n ast.Node) bool {
		switch n := n.(type) {
		case *ast.BasicLit:
			u.literals[literal(n)] = true
		case *ast.CallExpr:
			if at, ok := says[called(n)]; ok && at < len(n.Args) {
				u.noteCode(files, n.Args[at])
			}
		case *ast.AssignStmt:
			// A code that is chosen first is kept in a variable of that name.
			for i, left := range n.Lhs {
				if name, ok := left.(*ast.Ident); ok && name.Name == "code" && len(n.Rhs) == len(n.Lhs) {
					u.noteCode(files, n.Rhs[i])
				}
			}
		}
		return true
	})
}

func (u usage) noteCode(files *token.FileSet, code ast.Expr) {
	at := files.Position(code.Pos())
	switch code := code.(type) {
	case *ast.BasicLit:
		u.codes[literal(code)] = at
	case *ast.BinaryExpr:
		u.beginnings[literal(code.X)] = at
	}
}

// called is the name of the function that is called, without its package or
// receiver.
func called(c *ast.CallExpr) string {
	switch f := c.Fun.(type) {
	case *ast.Ident:
		return f.Name
	case *ast.SelectorExpr:
		return f.Sel.Name
	}
	return ""
}

// literal is the text of a literal, "" for anything else.
func literal(e ast.Expr) string {
	l, ok := e.(*ast.BasicLit)
	if !ok || l.Kind != token.STRING {
		return ""
	}
	text, err := strconv.Unquote(l.Value)
	if err != nil {
		return ""
	}
	return text
}
