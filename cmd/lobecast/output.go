package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"unicode"

	"lobecast/reactivity/report"
)

// outputOptions are shared by the commands that write a report.
type outputOptions struct {
	Output string `short:"o" name:"output" placeholder:"FILE" help:"Write to FILE instead of standard output; the file is replaced in one go."`
	Brief  bool   `help:"An aligned text table of at most 100 columns instead of TOML."`
}

// write writes a report in the form asked for. A report with refused input is
// written all the same and gives errRefused.
func (o outputOptions) write(c *command, r *report.Report) error {
	var buf bytes.Buffer
	var err error
	if o.Brief {
		var text bytes.Buffer
		err = r.WriteBrief(&text)
		buf.WriteString(printable(text.String()))
	} else {
		err = r.Write(&buf)
	}
	if err != nil {
		return err
	}
	if err := deliver(c, o.Output, buf.Bytes()); err != nil {
		return err
	}
	if r.AnyRefused() {
		for _, f := range r.AllRefused() {
			fmt.Fprintf(c.stderr, "lobecast: refused: %s\n", printable(f.Message))
		}
		return errRefused
	}
	return nil
}

// printable takes out the control characters, other than line breaks and tabs, by which a
// name in a file could play tricks on a terminal.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r != '\n' && r != '\t' && unicode.IsControl(r) {
			return '\uFFFD'
		}
		return r
	}, s)
}

// deliver writes data to a file, or to standard output where path is empty or "-". After
// an interrupt what was done until then is written all the same; the error then is that of
// the context.
func deliver(c *command, path string, data []byte) error {
	if path == "" || path == "-" {
		if _, err := c.stdout.Write(data); err != nil {
			return fileError{fmt.Errorf("cannot write to standard output: %w", err)}
		}
		return c.ctx.Err()
	}
	if err := c.notRead(path); err != nil {
		return err
	}
	if err := replaceFile(path, data); err != nil {
		return err
	}
	return c.ctx.Err()
}

// notRead refuses to put the output in the place of a file that was read.
func (c *command) notRead(path string) error {
	out, err := os.Stat(path)
	if err != nil || !out.Mode().IsRegular() {
		return nil
	}
	for _, name := range c.read {
		if in, err := os.Stat(name); err == nil && os.SameFile(in, out) {
			return usageError{fmt.Sprintf("%s was read by this command and would be written over; give another file", path)}
		}
	}
	return nil
}

// replaceFile puts data in the place of the file at path in one step: a temporary
// file in the same folder, then a rename. A symbolic link is followed, so that the
// link stays and its target is replaced; the permissions of an existing file stay.
func replaceFile(path string, data []byte) (err error) {
	target := path
	mode := os.FileMode(0o644)
	if real, e := filepath.EvalSymlinks(path); e == nil {
		target = real
	} else if link, e := os.Readlink(path); e == nil {
		// A link whose target does not exist yet.
		if !filepath.IsAbs(link) {
			link = filepath.Join(filepath.Dir(path), link)
		}
		target = link
	}
	if info, e := os.Stat(target); e == nil {
		if info.IsDir() {
			return fileError{fmt.Errorf("cannot write %s: it is a folder; give a file name", path)}
		}
		if !info.Mode().IsRegular() {
			// A device or a named pipe cannot be replaced, only written to.
			f, e := os.OpenFile(target, os.O_WRONLY, 0)
			if e != nil {
				return fileError{fmt.Errorf("cannot write %s: %w", path, e)}
			}
			_, e = f.Write(data)
			if e = errors.Join(e, f.Close()); e != nil {
				return fileError{fmt.Errorf("cannot write %s: %w", path, e)}
			}
			return nil
		}
		mode = info.Mode().Perm()
		// A file that may not be written is not replaced behind its owner's back.
		probe, e := os.OpenFile(target, os.O_WRONLY, 0)
		if e != nil {
			return fileError{fmt.Errorf("cannot write %s: %w", path, e)}
		}
		probe.Close()
	}
	f, err := os.CreateTemp(filepath.Dir(target), "."+filepath.Base(target)+".*")
	if err != nil {
		var pe *fs.PathError // names the temporary file, which means nothing to the user
		if errors.As(err, &pe) {
			err = pe.Err
		}
		return fileError{fmt.Errorf("cannot write %s: %w", path, err)}
	}
	defer func() {
		if err != nil {
			f.Close()
			os.Remove(f.Name())
			err = fileError{fmt.Errorf("cannot write %s: %w", path, err)}
		}
	}()
	if _, err = f.Write(data); err != nil {
		return err
	}
	if err = f.Chmod(mode); err != nil {
		return err
	}
	if err = f.Sync(); err != nil {
		return err
	}
	if err = f.Close(); err != nil {
		return err
	}
	return os.Rename(f.Name(), target)
}

// readInput reads a whole file, or standard input where path is "-".
func readInput(c *command, path string, limit int64) ([]byte, error) {
	var r io.Reader = c.stdin
	if path != "-" {
		f, err := os.Open(path)
		if err != nil {
			return nil, cannotOpen(err)
		}
		defer f.Close()
		c.read = append(c.read, path)
		if info, err := f.Stat(); err == nil && info.IsDir() {
			return nil, fileError{fmt.Errorf("cannot read %s: it is a folder; give a file", path)}
		}
		r = f
	}
	data, err := io.ReadAll(io.LimitReader(r, limit+1))
	if err != nil {
		return nil, fileError{fmt.Errorf("cannot read %s: %w", path, err)}
	}
	if int64(len(data)) > limit {
		return nil, fileError{fmt.Errorf("cannot read %s: it is larger than %d MiB; use survey for large files", path, limit>>20)}
	}
	return data, nil
}

// cannotOpen says of a file that does not open which it is and why, once.
func cannotOpen(err error) error {
	var pe *fs.PathError
	if errors.As(err, &pe) {
		return fileError{fmt.Errorf("cannot open %s: %w", pe.Path, pe.Err)}
	}
	return fileError{err}
}
