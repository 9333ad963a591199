package contract

import (
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"path"
	"path/filepath"
	"strconv"
	"strings"
)

// directive is how a comment gives the TypeScript form of a type.
const directive = "//contract:ts "

// pkg is a Go package as far as its types go.
type pkg struct {
	name  string
	types map[string]*typeDecl
	order []*typeDecl // as in the sources, files sorted by name
}

// typeDecl is a declared type.
type typeDecl struct {
	pkg     *pkg
	name    string
	doc     string
	given   string // the TypeScript that its comment gives, if any
	expr    ast.Expr
	generic bool
	file    *sourceFile
	pos     token.Pos
	custom  string     // the method by which it encodes itself, if any
	consts  []ast.Expr // the values of its constants
}

func (t *typeDecl) String() string { return t.pkg.name + "." + t.name }

// sourceFile is a file with what its imports are called in it.
type sourceFile struct {
	set     *token.FileSet
	imports map[string]string // local name -> import path
}

// errorf makes an error that says where in the sources its cause is.
func (f *sourceFile) errorf(pos token.Pos, format string, args ...any) error {
	p := f.set.Position(pos)
	return fmt.Errorf("%s:%d: %s", filepath.Base(p.Filename), p.Line, fmt.Sprintf(format, args...))
}

// readPackage reads all sources of a package but its tests.
func readPackage(from Package) (*pkg, error) {
	entries, err := os.ReadDir(from.Dir)
	if err != nil {
		return nil, fmt.Errorf("cannot read the package %s: %w", from.Path, err)
	}
	p := &pkg{types: map[string]*typeDecl{}}
	var files []*ast.File
	set := token.NewFileSet()
	for _, e := range entries {
		if !strings.HasSuffix(e.Name(), ".go") || strings.HasSuffix(e.Name(), "_test.go") {
			continue
		}
		f, err := parser.ParseFile(set, filepath.Join(from.Dir, e.Name()), nil, parser.ParseComments|parser.SkipObjectResolution)
		if err != nil {
			return nil, err
		}
		files = append(files, f)
		p.name = f.Name.Name
		p.addTypes(f, &sourceFile{set, importNames(f)})
	}
	for _, f := range files {
		p.addConstants(f)
		p.addMethods(f)
	}
	return p, nil
}

// importNames lists what the imports of a file are called in it.
func importNames(f *ast.File) map[string]string {
	names := map[string]string{}
	for _, spec := range f.Imports {
		importPath, _ := strconv.Unquote(spec.Path.Value) // the parser has checked it
		name := path.Base(importPath)
		if spec.Name != nil {
			name = spec.Name.Name
		}
		names[name] = importPath
	}
	return names
}

// addTypes notes the types that a file declares.
func (p *pkg) addTypes(f *ast.File, file *sourceFile) {
	for _, d := range f.Decls {
		decl, ok := d.(*ast.GenDecl)
		if !ok || decl.Tok != token.TYPE {
			continue
		}
		for _, s := range decl.Specs {
			spec := s.(*ast.TypeSpec)
			doc := spec.Doc
			if doc == nil {
				doc = decl.Doc
			}
			t := &typeDecl{
				pkg: p, name: spec.Name.Name, doc: doc.Text(), given: givenType(doc),
				expr: spec.Type, generic: spec.TypeParams != nil, file: file, pos: spec.Pos(),
			}
			p.types[t.name] = t
			p.order = append(p.order, t)
		}
	}
}

// givenType is the TypeScript that a comment gives.
func givenType(doc *ast.CommentGroup) string {
	if doc == nil {
		return ""
	}
	for _, line := range doc.List {
		if given, ok := strings.CutPrefix(line.Text, directive); ok {
			return strings.TrimSpace(given)
		}
	}
	return ""
}

// addConstants notes the constants of the package's own types, whether typed
// (const A Kind = "a") or converted (const A = Kind("a")).
func (p *pkg) addConstants(f *ast.File) {
	for _, d := range f.Decls {
		decl, ok := d.(*ast.GenDecl)
		if !ok || decl.Tok != token.CONST {
			continue
		}
		for _, s := range decl.Specs {
			spec := s.(*ast.ValueSpec)
			for _, value := range spec.Values {
				typ := spec.Type
				if call, ok := value.(*ast.CallExpr); ok && typ == nil && len(call.Args) == 1 {
					typ, value = call.Fun, call.Args[0]
				}
				if id, ok := typ.(*ast.Ident); ok && p.types[id.Name] != nil {
					t := p.types[id.Name]
					t.consts = append(t.consts, value)
				}
			}
		}
	}
}

// addMethods notes which types encode themselves.
func (p *pkg) addMethods(f *ast.File) {
	for _, d := range f.Decls {
		decl, ok := d.(*ast.FuncDecl)
		if !ok || decl.Recv == nil {
			continue
		}
		if name := decl.Name.Name; name != "MarshalJSON" && name != "MarshalText" {
			continue
		}
		receiver := decl.Recv.List[0].Type
		if star, ok := receiver.(*ast.StarExpr); ok {
			receiver = star.X
		}
		if id, ok := receiver.(*ast.Ident); ok && p.types[id.Name] != nil {
			p.types[id.Name].custom = decl.Name.Name
		}
	}
}
