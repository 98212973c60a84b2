package main

import (
	"encoding/csv"
	"fmt"
	"os"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
)

// folder is the instances of one folder and what is known about them.
type folder struct {
	path  string
	files []string
	known map[string]known
}

// known is a row of best.csv: bounds on the shortest finish, or that there is no plan.
type known struct {
	lower, upper int
	none         bool
}

// gather sorts the paths into folders and takes the sample.
func gather(paths []string, o settings) ([]folder, error) {
	byPath := map[string]*folder{}
	var order []string
	add := func(dir, file string) {
		f := byPath[dir]
		if f == nil {
			f = &folder{path: dir}
			byPath[dir] = f
			order = append(order, dir)
		}
		f.files = append(f.files, file)
	}
	for _, p := range paths {
		info, err := os.Stat(p)
		if err != nil {
			return nil, err
		}
		if !info.IsDir() {
			add(filepath.Dir(p), p)
			continue
		}
		list, err := os.ReadDir(p)
		if err != nil {
			return nil, err
		}
		n := 0
		for _, e := range sortedInstances(list) {
			if n >= o.offset && (n-o.offset)%o.every == 0 {
				add(p, filepath.Join(p, e))
			}
			n++
		}
		if n == 0 {
			return nil, fmt.Errorf("%s holds no .sm, .sch or .rcp files", p)
		}
	}
	var out []folder
	for _, dir := range order {
		f := byPath[dir]
		var err error
		if f.known, err = readKnown(filepath.Join(dir, "best.csv")); err != nil {
			return nil, err
		}
		out = append(out, *f)
	}
	return out, nil
}

// sortedInstances gives the instance files of a folder, numbers in their names in order of size.
func sortedInstances(list []os.DirEntry) []string {
	var out []string
	for _, e := range list {
		switch strings.ToLower(filepath.Ext(e.Name())) {
		case ".sm", ".sch", ".rcp":
			out = append(out, e.Name())
		}
	}
	sort.Slice(out, func(i, j int) bool { return natural(out[i]) < natural(out[j]) })
	return out
}

// natural writes every number in a name with eight digits, so that names sort by them.
func natural(name string) string {
	var b strings.Builder
	for i := 0; i < len(name); {
		j := i
		for j < len(name) && name[j] >= '0' && name[j] <= '9' {
			j++
		}
		if j == i {
			b.WriteByte(name[i])
			i++
			continue
		}
		b.WriteString(strings.Repeat("0", max(0, 8-(j-i))))
		b.WriteString(name[i:j])
		i = j
	}
	return b.String()
}

// readKnown reads best.csv; no file means that nothing is known.
func readKnown(path string) (map[string]known, error) {
	file, err := os.Open(path)
	if os.IsNotExist(err) {
		return nil, nil
	}
	if err != nil {
		return nil, err
	}
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	if err != nil {
		return nil, fmt.Errorf("%s: %w", path, err)
	}
	out := map[string]known{}
	for i, r := range rows {
		if i == 0 {
			continue
		}
		if len(r) != 3 {
			return nil, fmt.Errorf("%s: row %d: want instance,lower,upper", path, i+1)
		}
		name := strings.ToLower(r[0])
		if r[1] == "unsat" {
			out[name] = known{none: true}
			continue
		}
		lo, err1 := strconv.Atoi(r[1])
		hi, err2 := strconv.Atoi(r[2])
		if err1 != nil || err2 != nil {
			return nil, fmt.Errorf("%s: row %d: bounds %q and %q are not whole numbers", path, i+1, r[1], r[2])
		}
		out[name] = known{lower: lo, upper: hi}
	}
	return out, nil
}
