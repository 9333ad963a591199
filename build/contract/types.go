package contract

import (
	"fmt"
	"go/ast"
	"go/token"
	"reflect"
	"regexp"
	"slices"
	"strconv"
	"strings"
)

// basic are the TypeScript types of Go's own ones.
var basic = map[string]string{
	"bool": "boolean", "string": "string", "any": "unknown",
	"int": "number", "int8": "number", "int16": "number", "int32": "number", "int64": "number",
	"uint": "number", "uint8": "number", "uint16": "number", "uint32": "number", "uint64": "number",
	"byte": "number", "rune": "number", "float32": "number", "float64": "number",
}

// foreign are the TypeScript types of those from the standard library.
var foreign = map[string]string{
	"time.Time":                "string",
	"encoding/json.RawMessage": "unknown",
}

// declare writes the declaration of a type.
func (w *writer) declare(t *typeDecl) (string, error) {
	switch {
	case t.given != "":
		return fmt.Sprintf("export type %s = %s;\n", t.name, t.given), nil
	case t.custom != "":
		return "", t.file.errorf(t.pos, "%s encodes itself by %s; say what comes out in a comment line %sTYPE", t, t.custom, directive)
	case t.generic:
		return "", t.file.errorf(t.pos, "%s has type parameters, which the contract cannot express; declare it without", t)
	}
	if s, ok := t.expr.(*ast.StructType); ok {
		fields, err := w.fields(t, s)
		if err != nil {
			return "", err
		}
		return fmt.Sprintf("export interface %s {\n%s}\n", t.name, formatFields(fields)), nil
	}
	if id, ok := t.expr.(*ast.Ident); ok && id.Name == "string" && len(t.consts) > 0 {
		return w.union(t)
	}
	text, err := w.typeOf(t, t.expr)
	return fmt.Sprintf("export type %s = %s;\n", t.name, text), err
}

// union writes a string type with constants as the union of their values.
func (w *writer) union(t *typeDecl) (string, error) {
	var values []string
	for _, c := range t.consts {
		lit, ok := c.(*ast.BasicLit)
		if !ok || lit.Kind != token.STRING {
			return "", t.file.errorf(t.pos, "a constant of %s is not a plain string; write it as one", t)
		}
		value, err := strconv.Unquote(lit.Value)
		if err != nil {
			return "", err
		}
		if quoted := strconv.Quote(value); !slices.Contains(values, quoted) {
			values = append(values, quoted)
		}
	}
	return fmt.Sprintf("export type %s = %s;\n", t.name, strings.Join(values, " | ")), nil
}

// field is a field of a struct as JSON has it.
type field struct {
	name     string
	doc      string
	typ      string
	optional bool
}

// fields lists the fields of a struct that are encoded, those of embedded
// structs among them.
func (w *writer) fields(t *typeDecl, s *ast.StructType) ([]field, error) {
	var list []field
	add := func(more ...field) error {
		for _, f := range more {
			if slices.ContainsFunc(list, func(other field) bool { return other.name == f.name }) {
				return t.file.errorf(t.pos, "%s has two fields that are called %q in JSON; rename one of them", t, f.name)
			}
			list = append(list, f)
		}
		return nil
	}
	for _, f := range s.Fields.List {
		name, options, tagged := jsonTag(f.Tag)
		if name == "-" && len(options) == 0 {
			continue
		}
		if len(f.Names) == 0 && !tagged {
			embedded, err := w.embedded(t, f)
			if err != nil {
				return nil, err
			}
			if err := add(embedded...); err != nil {
				return nil, err
			}
			continue
		}
		for _, goName := range fieldNames(f) {
			one, err := w.field(t, f, name, options)
			if err != nil {
				return nil, err
			}
			if !tagged {
				one.name = goName
			}
			if err := add(one); err != nil {
				return nil, err
			}
		}
	}
	return list, nil
}

// fieldNames are the Go names of a field line that encoding/json looks at.
func fieldNames(f *ast.Field) []string {
	if len(f.Names) == 0 {
		return []string{""} // embedded under a name that its tag gives
	}
	var names []string
	for _, id := range f.Names {
		if id.IsExported() {
			names = append(names, id.Name)
		}
	}
	return names
}

// field describes one field.
func (w *writer) field(t *typeDecl, f *ast.Field, name string, options []string) (field, error) {
	if slices.Contains(options, "string") {
		return field{}, t.file.errorf(f.Pos(), "the JSON option \"string\" is not known to the contract; use a string field")
	}
	doc := f.Doc.Text()
	if doc == "" {
		doc = f.Comment.Text()
	}
	optional := slices.Contains(options, "omitempty") || slices.Contains(options, "omitzero")
	expr := f.Type
	if star, ok := expr.(*ast.StarExpr); ok && optional {
		expr = star.X // left out when nil, hence never null
	}
	typ, err := w.typeOf(t, expr)
	return field{name, doc, typ, optional}, err
}

// embedded lists the fields that an embedded struct brings in. Those of an
// embedded pointer may all be missing.
func (w *writer) embedded(t *typeDecl, f *ast.Field) ([]field, error) {
	expr := f.Type
	star, pointer := expr.(*ast.StarExpr)
	if pointer {
		expr = star.X
	}
	inner, err := w.lookUp(t, expr)
	if err != nil {
		return nil, err
	}
	if inner != nil && inner.custom == "" && inner.given == "" {
		if s, ok := inner.expr.(*ast.StructType); ok {
			fields, err := w.fields(inner, s)
			for i := range fields {
				fields[i].optional = fields[i].optional || pointer
			}
			return fields, err
		}
	}
	return nil, t.file.errorf(f.Pos(), "only a plain struct may be embedded in %s; give the field a name", t)
}

// jsonTag takes a field's tag apart. tagged tells whether it gives a name.
func jsonTag(tag *ast.BasicLit) (name string, options []string, tagged bool) {
	if tag == nil {
		return "", nil, false
	}
	text, _ := strconv.Unquote(tag.Value) // the parser has checked it
	parts := strings.Split(reflect.StructTag(text).Get("json"), ",")
	return parts[0], parts[1:], parts[0] != ""
}

// formatFields writes fields as the inside of an interface.
func formatFields(fields []field) string {
	var out strings.Builder
	for _, f := range fields {
		out.WriteString(docComment(f.doc, "  "))
		fmt.Fprintf(&out, "  %s: %s;\n", f.key(), f.typ)
	}
	return out.String()
}

// plainKey matches a property name that needs no quotes.
var plainKey = regexp.MustCompile(`^[A-Za-z_$][A-Za-z0-9_$]*$`)

// key is the name of a field with a question mark where it may be missing.
func (f field) key() string {
	name := f.name
	if !plainKey.MatchString(name) {
		name = strconv.Quote(name)
	}
	if f.optional {
		name += "?"
	}
	return name
}

// typeOf writes a type where it is used. t is the declaration that it is in.
func (w *writer) typeOf(t *typeDecl, expr ast.Expr) (string, error) {
	switch e := expr.(type) {
	case *ast.Ident, *ast.SelectorExpr:
		return w.named(t, e)
	case *ast.ParenExpr:
		return w.typeOf(t, e.X)
	case *ast.StarExpr:
		inner, err := w.typeOf(t, e.X)
		return inner + " | null", err
	case *ast.ArrayType:
		return w.array(t, e)
	case *ast.MapType:
		return w.mapType(t, e)
	case *ast.StructType:
		return w.inline(t, e)
	case *ast.InterfaceType:
		if len(e.Methods.List) == 0 {
			return "unknown", nil
		}
	}
	return "", t.file.errorf(expr.Pos(), "%s holds a type that JSON or the contract cannot express; use a struct, slice, map, number or string", t)
}

// named writes a type by its name.
func (w *writer) named(t *typeDecl, expr ast.Expr) (string, error) {
	declared, err := w.lookUp(t, expr)
	if err != nil {
		return "", err
	}
	if declared != nil {
		return w.use(declared)
	}
	if id, ok := expr.(*ast.Ident); ok {
		return basic[id.Name], nil
	}
	return foreign[foreignName(t, expr.(*ast.SelectorExpr))], nil
}

// lookUp finds the declaration of a named type; there is none for the types
// that are known by themselves.
func (w *writer) lookUp(t *typeDecl, expr ast.Expr) (*typeDecl, error) {
	switch e := expr.(type) {
	case *ast.Ident:
		if declared := t.pkg.types[e.Name]; declared != nil {
			return declared, nil
		}
		if basic[e.Name] != "" {
			return nil, nil
		}
		return nil, t.file.errorf(e.Pos(), "the contract cannot express the type %s; use another one", e.Name)
	case *ast.SelectorExpr:
		name := foreignName(t, e)
		if foreign[name] != "" {
			return nil, nil
		}
		if p := w.byPath[strings.TrimSuffix(name, "."+e.Sel.Name)]; p != nil && p.types[e.Sel.Name] != nil {
			return p.types[e.Sel.Name], nil
		}
		return nil, t.file.errorf(e.Pos(), "the type %s is not in the packages that the contract reads; add its package to the list", name)
	}
	return nil, nil
}

// foreignName is the import path of another package's type with its name.
func foreignName(t *typeDecl, e *ast.SelectorExpr) string {
	local := e.X.(*ast.Ident).Name // a type's selector is always package.Type
	return t.file.imports[local] + "." + e.Sel.Name
}

func (w *writer) array(t *typeDecl, e *ast.ArrayType) (string, error) {
	if id, ok := e.Elt.(*ast.Ident); ok && e.Len == nil && (id.Name == "byte" || id.Name == "uint8") {
		return "string", nil // base64
	}
	inner, err := w.typeOf(t, e.Elt)
	if strings.Contains(inner, " | ") {
		inner = "(" + inner + ")"
	}
	return inner + "[]", err
}

// mapType writes a map. Its keys are strings in JSON whatever they are in Go.
func (w *writer) mapType(t *typeDecl, e *ast.MapType) (string, error) {
	inner, err := w.typeOf(t, e.Value)
	return "{ [key: string]: " + inner + " }", err
}

// inline writes a struct that has no name of its own.
func (w *writer) inline(t *typeDecl, s *ast.StructType) (string, error) {
	fields, err := w.fields(t, s)
	var parts []string
	for _, f := range fields {
		parts = append(parts, f.key()+": "+f.typ)
	}
	return "{ " + strings.Join(parts, "; ") + " }", err
}
