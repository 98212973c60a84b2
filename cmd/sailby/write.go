package main

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
)

// writeWhole writes a file whole or not at all: into a temporary file in the same folder, which
// takes the file's name once it is on the disk. A file that is there is replaced.
func writeWhole(path string, data []byte) error {
	mode := fs.FileMode(0o644)
	if real, err := filepath.EvalSymlinks(path); err == nil {
		path = real
	}
	if info, err := os.Stat(path); err == nil {
		if !info.Mode().IsRegular() {
			return &fs.PathError{Op: "write", Path: path, Err: errors.New("it is no file that can be replaced")}
		}
		mode = info.Mode().Perm()
	}
	temp, err := writeTemp(path, data, mode)
	if err != nil {
		return err
	}
	if err := os.Rename(temp, path); err != nil {
		_ = os.Remove(temp)
		return err
	}
	return nil
}

// writeNew is writeWhole for a file that must not be there: then the error is fs.ErrExist.
func writeNew(path string, data []byte) error {
	if _, err := os.Lstat(path); err == nil {
		return &fs.PathError{Op: "write", Path: path, Err: fs.ErrExist}
	}
	temp, err := writeTemp(path, data, 0o644)
	if err != nil {
		return err
	}
	defer os.Remove(temp)
	if err := os.Link(temp, path); err == nil || errors.Is(err, fs.ErrExist) {
		return err
	}
	f, err := os.OpenFile(path, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644) // no links on this disk
	if err != nil {
		return err
	}
	return fill(f, data)
}

func writeTemp(path string, data []byte, mode fs.FileMode) (string, error) {
	f, err := os.CreateTemp(filepath.Dir(path), ".sailby-*")
	if err != nil {
		return "", &fs.PathError{Op: "write", Path: path, Err: errors.Unwrap(err)}
	}
	if err = fill(f, data); err == nil {
		err = os.Chmod(f.Name(), mode)
	}
	if err != nil {
		_ = os.Remove(f.Name())
		return "", err
	}
	return f.Name(), nil
}

// fill writes data, sees it onto the disk and closes the file.
func fill(f *os.File, data []byte) error {
	_, err := f.Write(data)
	if err == nil {
		err = f.Sync()
	}
	return errors.Join(err, f.Close())
}
