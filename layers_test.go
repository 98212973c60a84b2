package sailby_test

import (
	"go/parser"
	"go/token"
	"io/fs"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// leaves may be imported by anybody and import nothing of the project but other leaves.
var leaves = []string{"tasks/quantity", "tasks/origin", "tasks/hours"}

// mayImport says, package by package, what each may import beside the leaves. A package that
// is not named here may import nothing: add it with thought.
var mayImport = map[string][]string{
	"tasks/quantity": {},
	"tasks/origin":   {},
	"tasks/hours":    {},

	"weld":          {},
	"tasks/coat":    {},
	"tasks/lift":    {},
	"tasks/site":    {"tasks/coat"},
	"tasks":         {"weld", "tasks/coat", "tasks/lift", "tasks/site"},
	"tasks/jobfile": {"tasks", "weld", "tasks/coat", "tasks/lift", "tasks/site"},
	"tasks/expand":  {"tasks", "weld", "tasks/coat", "tasks/lift", "tasks/site"},

	"plan":          {"tasks", "tasks/expand"},
	"plan/problem":  {"plan", "tasks", "tasks/expand", "tasks/site"},
	"plan/network":  {"plan/problem", "tasks", "tasks/expand"},
	"plan/solve":    {"plan", "plan/network", "plan/problem", "tasks", "tasks/expand"},
	"plan/learn":    {"plan/problem", "plan/network", "tasks", "tasks/expand"},
	"plan/instance": {"plan", "plan/problem", "plan/check", "tasks", "tasks/expand"},
	"plan/proof":    {"plan/problem", "tasks", "tasks/expand"},                     // never network, solve, learn
	"plan/check":    {"plan", "tasks", "tasks/expand", "tasks/lift", "tasks/site"}, // never problem, network, solve, learn
	"plan/settle":   {"plan", "plan/check", "plan/limits", "plan/network", "plan/problem", "plan/solve", "plan/learn", "plan/proof", "tasks", "tasks/expand"},
	"plan/limits":   {"plan", "plan/network", "plan/problem", "plan/solve", "plan/learn", "tasks", "tasks/expand"},
	"plan/ways":     {"plan", "plan/problem", "plan/settle", "tasks", "tasks/expand"},
	"plan/mutants":  {},
	"plan/random":   {},

	"report/clean":        {},
	"report/agenda":       {"plan", "report/clean", "tasks", "tasks/expand", "tasks/site", "weld"},
	"report/packlist":     {"plan", "report/agenda", "report/clean", "tasks", "tasks/coat", "tasks/expand", "tasks/lift"},
	"report/text":         {"plan", "report/agenda", "report/clean", "report/packlist", "tasks", "tasks/expand"},
	"report/sheets":       {"plan", "report/agenda", "report/clean", "report/packlist", "tasks", "tasks/expand", "tasks/lift", "weld"},
	"report/pdf":          {"report/clean", "report/sheets"},
	"report/export":       {"plan", "report/agenda", "report/clean", "tasks", "tasks/expand"},
	"report/screen/model": {"plan", "report/agenda", "report/clean", "report/text", "tasks", "tasks/expand"},
	"report/screen":       {"plan", "report/clean", "report/screen/model", "tasks"},
	"report/fixture":      {"plan", "tasks", "tasks/coat", "tasks/expand", "weld"}, // for tests only

	"cmd/sailby": {"plan", "plan/settle", "plan/ways", "tasks", "tasks/jobfile", "tasks/expand", "tasks/coat", "tasks/lift", "weld",
		"report/agenda", "report/clean", "report/export", "report/pdf", "report/screen", "report/sheets", "report/text"},
	"cmd/sailbench/sidebyside": {"plan/instance"},
	"cmd/sailbench":            {"plan", "plan/network", "plan/random", "plan/settle", "tasks", "tasks/expand", "tasks/jobfile", "plan/check", "plan/instance", "plan/learn", "plan/problem", "plan/solve", "plan/proof"},
}

// onlyHere holds modules to the one package that may import them.
var onlyHere = map[string][]string{
	"github.com/jung-kurt/gofpdf":   {"report/pdf"},
	"github.com/rivo/tview":         {"report/screen"},
	"github.com/spf13/cobra":        {"cmd/sailby"},
	"gopkg.in/yaml.v3":              {"tasks/jobfile"},
	"github.com/arran4/golang-ical": {"report/export"},
	"github.com/rickar/cal/v2":      {"tasks/jobfile", "tasks/hours"},
	"github.com/gdamore/tcell/v2":   {"report/screen", "cmd/sailby"},
}

func TestWhoMayImportWhom(t *testing.T) {
	used := map[string]bool{}
	err := filepath.WalkDir(".", func(file string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		file = filepath.ToSlash(file)
		if d.IsDir() {
			if name := d.Name(); file != "." && (strings.HasPrefix(name, ".") || name == "testdata") {
				return fs.SkipDir
			}
			return nil
		}
		if !strings.HasSuffix(file, ".go") || strings.HasSuffix(file, "_test.go") {
			return nil
		}
		pkg := path.Dir(file)
		allowed, known := mayImport[pkg]
		if !known {
			t.Errorf("%s: package %q is not in the list of layers", file, pkg)
			return nil
		}
		used[pkg] = true
		f, err := parser.ParseFile(token.NewFileSet(), file, nil, parser.ImportsOnly)
		if err != nil {
			return err
		}
		for _, im := range f.Imports {
			what, _ := strconv.Unquote(im.Path.Value)
			own, ours := strings.CutPrefix(what, "sailby/")
			if ours && !slices.Contains(leaves, own) && !slices.Contains(allowed, own) {
				t.Errorf("%s imports %s, which its layer may not", file, own)
			}
			if ours && own == "report/fixture" {
				t.Errorf("%s imports report/fixture, which is for tests", file)
			}
			for module, where := range onlyHere {
				if (what == module || strings.HasPrefix(what, module+"/")) && !within(pkg, where) {
					t.Errorf("%s imports %s, which is kept behind %v", file, module, where)
				}
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(used) < 20 {
		t.Errorf("only %d packages were looked at: the test does not run at the root of the project", len(used))
	}
}

func within(pkg string, where []string) bool {
	for _, w := range where {
		if pkg == w || strings.HasPrefix(pkg, w+"/") {
			return true
		}
	}
	return false
}
