package main

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"runtime"
	"testing"
)

// only looks whether the folder holds these files and nothing else.
func only(t *testing.T, dir string, names ...string) {
	t.Helper()
	list, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, e := range list {
		got = append(got, e.Name())
	}
	if len(got) != len(names) {
		t.Fatalf("the folder holds %q, want %q", got, names)
	}
	for i := range got {
		if got[i] != names[i] {
			t.Fatalf("the folder holds %q, want %q", got, names)
		}
	}
}

func TestWriteWhole(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "pack.pdf")
	for _, text := range []string{"one", "two, longer", ""} {
		if err := writeWhole(path, []byte(text)); err != nil {
			t.Fatal(err)
		}
		if got, _ := os.ReadFile(path); string(got) != text {
			t.Errorf("the file holds %q, want %q", got, text)
		}
	}
	only(t, dir, "pack.pdf")
	if err := writeWhole(dir, nil); err == nil {
		t.Error("a folder was replaced")
	}
	if err := writeWhole(filepath.Join(dir, "no", "pack.pdf"), nil); !errors.Is(err, fs.ErrNotExist) {
		t.Errorf("into a folder that is not there: %v", err)
	}
	only(t, dir, "pack.pdf")
}

// TestWriteKeeps: the mode of a file that is replaced stays, and a link stays a link.
func TestWriteKeeps(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("modes and links are another matter there")
	}
	dir := t.TempDir()
	path, link := filepath.Join(dir, "b"), filepath.Join(dir, "a")
	if err := os.WriteFile(path, []byte("old"), 0o600); err != nil {
		t.Fatal(err)
	}
	if err := os.Symlink(path, link); err != nil {
		t.Fatal(err)
	}
	if err := writeWhole(link, []byte("new")); err != nil {
		t.Fatal(err)
	}
	info, err := os.Lstat(path)
	if err != nil || info.Mode().Perm() != 0o600 {
		t.Errorf("mode %v, %v", info.Mode(), err)
	}
	if info, _ := os.Lstat(link); info.Mode()&fs.ModeSymlink == 0 {
		t.Error("the link is gone")
	}
	if got, _ := os.ReadFile(path); string(got) != "new" {
		t.Errorf("the file holds %q", got)
	}
	only(t, dir, "a", "b")
}

func TestWriteNew(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "job.yaml")
	if err := writeNew(path, []byte("first")); err != nil {
		t.Fatal(err)
	}
	if err := writeNew(path, []byte("second")); !errors.Is(err, fs.ErrExist) {
		t.Errorf("the second writing gives %v", err)
	}
	if got, _ := os.ReadFile(path); string(got) != "first" {
		t.Errorf("the file holds %q", got)
	}
	only(t, dir, "job.yaml")
}
