package main

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"strings"

	"lobecast/frontier/molecule"
)

// structureInput is one structure as it was given, read or refused.
type structureInput struct {
	Input    string // the SMILES, or "FILE, record n"
	Name     string
	Molecule *molecule.Molecule
	Err      error
}

// Files larger than this are survey's work.
const structureFileLimit = 64 << 20

// readStructures reads the STRUCTURE arguments: a SMILES string, a path ending in
// .mol, .sdf or .smi, or "-" for one structure on standard input.
func readStructures(c *command, args []string) ([]structureInput, error) {
	var all []structureInput
	for _, arg := range args {
		more, err := readStructure(c, arg)
		if err != nil {
			return nil, err
		}
		all = append(all, more...)
	}
	return all, nil
}

func readStructure(c *command, arg string) ([]structureInput, error) {
	lower := strings.ToLower(arg)
	switch {
	case arg == "-":
		data, err := readInput(c, "-", structureFileLimit)
		if err != nil {
			return nil, err
		}
		if bytes.Contains(data, []byte("M  END")) || bytes.Contains(data, []byte("V2000")) || bytes.Contains(data, []byte("V3000")) {
			return readSDF(bytes.NewReader(data), "standard input")
		}
		return readSMILESLines(data, "standard input")
	case strings.HasSuffix(lower, ".mol"), strings.HasSuffix(lower, ".sdf"):
		f, err := os.Open(arg)
		if err != nil {
			return nil, cannotOpen(err)
		}
		defer f.Close()
		c.read = append(c.read, arg)
		return readSDF(bufio.NewReaderSize(io.LimitReader(f, structureFileLimit), 1<<16), arg)
	case strings.HasSuffix(lower, ".smi"):
		data, err := readInput(c, arg, structureFileLimit)
		if err != nil {
			return nil, err
		}
		return readSMILESLines(data, arg)
	}
	m, err := molecule.ParseSMILES(arg)
	return []structureInput{{Input: arg, Molecule: m, Err: err}}, nil
}

func readSDF(r io.Reader, file string) ([]structureInput, error) {
	var all []structureInput
	scanner := molecule.NewSDFScanner(r, file)
	for n := 1; ; n++ {
		m, err := scanner.Next()
		if errors.Is(err, io.EOF) {
			break
		}
		in := structureInput{Input: fmt.Sprintf("%s, record %d", file, n), Molecule: m, Err: err}
		if m != nil {
			in.Name = m.Name
		}
		all = append(all, in)
		var refusal *molecule.Error
		if err != nil && !errors.As(err, &refusal) {
			return nil, fileError{fmt.Errorf("cannot read %s: %w", file, err)}
		}
	}
	if len(all) == 0 {
		return nil, fileError{fmt.Errorf("%s holds no structure", file)}
	}
	return all, nil
}

// readSMILESLines reads a SMILES file: one SMILES a line, a name after white space;
// empty lines and lines that start with # are passed over.
func readSMILESLines(data []byte, file string) ([]structureInput, error) {
	var all []structureInput
	for n, line := range strings.Split(string(data), "\n") {
		line = strings.TrimSpace(strings.TrimSuffix(line, "\r"))
		if line == "" || strings.HasPrefix(line, "# ") || line == "#" {
			continue
		}
		text, name, _ := strings.Cut(line, " ")
		if s, after, ok := strings.Cut(text, "\t"); ok {
			text, name = s, after+" "+name
		}
		m, err := molecule.ParseSMILES(text)
		var refusal *molecule.Error
		if errors.As(err, &refusal) {
			refusal.File, refusal.Line = file, n+1
		}
		all = append(all, structureInput{Input: text, Name: strings.TrimSpace(name), Molecule: m, Err: err})
	}
	if len(all) == 0 {
		return nil, fileError{fmt.Errorf("%s holds no structure; give one SMILES a line", file)}
	}
	return all, nil
}
