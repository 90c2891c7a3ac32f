package main

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"time"

	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/survey"
)

type surveyCommand struct {
	Files      []string `arg:"" name:"file" help:"SMILES or reaction SMILES, one a line, or SD files; gzip too; - is standard input."`
	As         string   `enum:"toml,csv" default:"toml" help:"Form of the output: toml or csv (default ${default})."`
	Output     string   `short:"o" placeholder:"FILE" help:"Append whole records to FILE instead of writing to standard output."`
	Resume     bool     `help:"Go on where an interrupted run left FILE."`
	Shard      string   `placeholder:"i/n" help:"Only every n-th line, beginning with line i."`
	Where      string   `placeholder:"CONDITIONS" help:"Only records that satisfy conditions on the columns, for instance 'planned_chance < 0.3 and call = split'."`
	Top        int      `placeholder:"N" help:"Only the N most doubtful records, the lowest planned chance first."`
	Toward     string   `enum:"electrophile,nucleophile,radical," default:"" placeholder:"WHAT" help:"For structures: attack by an electrophile, a nucleophile or a radical (default: as the incoming group comes, else an electrophile)."`
	Incoming   string   `placeholder:"SMILES" help:"For structures: the group that comes in, a SMILES with one * where it binds: *Br, *[N+](=O)[O-], *C(C)=O."`
	Medium     string   `enum:"neutral,acidic,unknown," default:"" placeholder:"MEDIUM" help:"neutral, acidic or unknown; without it the agents of each reaction decide."`
	Parameters string   `placeholder:"NAME|FILE" help:"Parameter set by name, or a TOML file (default: calibrated)."`
	Brief      bool     `help:"A table for reading, a line for each record, instead of TOML or CSV."`
	NoLimits   bool     `help:"Leave out the limits on chances (faster); calls then rest on the chances alone."`
}

func (s *surveyCommand) Help() string {
	return `Streams in constant memory on all cores; the output is in the order of the input. A line that cannot be read or judged becomes a record with its reason, and the exit status is then 1.

  lobecast survey reactions.rsmi --as csv -o judged.csv
  lobecast survey reactions.rsmi --as csv -o judged.csv --resume
  lobecast survey reactions.rsmi --where 'planned_chance < 0.3' --top 50 --brief
  lobecast survey library.smi.gz --incoming '*Br' --as csv
  lobecast survey reactions.rsmi --as csv --shard 3/16 -o part-3.csv`
}

func (s *surveyCommand) Run(c *command) error {
	opt := survey.Options{
		Medium: terms.Medium(s.Medium), Toward: terms.Toward(s.Toward), NoLimits: s.NoLimits,
		CSV: s.As == "csv", Brief: s.Brief, Top: s.Top,
	}
	var err error
	if opt.Set, err = loadSet(s.Parameters); err != nil {
		return err
	}
	if s.Incoming != "" {
		if opt.Incoming, err = reactivity.ParseIncoming(s.Incoming); err != nil {
			return usageError{fmt.Sprintf("--incoming: %v", err)}
		}
	}
	if s.Top < 0 {
		return usageError{"--top needs a positive number"}
	}
	if s.Shard != "" {
		if opt.Shard, err = survey.ParseShard(s.Shard); err != nil {
			return usageError{"--shard: " + err.Error()}
		}
	}
	if s.Where != "" {
		if opt.Where, err = survey.ParseFilter(s.Where); err != nil {
			return usageError{err.Error()}
		}
	}
	if s.Resume && (s.Output == "" || s.Output == "-") {
		return usageError{"--resume needs -o FILE, the output to go on with"}
	}
	switch {
	case s.Brief && s.As == "csv":
		return usageError{"give either --brief or --as csv"}
	case s.Brief && s.Resume:
		return usageError{"--brief cannot be resumed: its lines are for reading; use --as csv"}
	}
	if s.Resume && s.Top > 0 {
		return usageError{"--top cannot be resumed: it keeps its records until the end"}
	}
	inputs, err := s.inputs(c)
	if err != nil {
		return err
	}
	var out io.Writer = c.stdout
	var file *os.File
	var last survey.Mark
	header := opt.Shard.I <= 1
	if s.Output != "" && s.Output != "-" {
		if err := s.notAnInput(); err != nil {
			return err
		}
		if file, last, err = s.open(opt.CSV, opt.Shard); err != nil {
			return err
		}
		defer file.Close()
		if at, _ := file.Seek(0, io.SeekCurrent); at > 0 {
			header = false
		}
		out = file
	}
	defer survey.SetCollection()()
	watch := newProgress(c.stderr, s.Files)
	sum, err := survey.Run(c.ctx, inputs, out, last, header, opt, watch.tick)
	watch.end()
	if file != nil {
		if e := errors.Join(synced(file), file.Close()); e != nil && err == nil && c.ctx.Err() == nil {
			err = fmt.Errorf("cannot write %s: %w", s.Output, e)
		}
	}
	if err != nil {
		if c.ctx.Err() != nil {
			fmt.Fprintf(c.stderr, "lobecast: interrupted: %s\n", sum)
			return c.ctx.Err()
		}
		return fileError{err}
	}
	fmt.Fprintf(c.stderr, "lobecast: %s\n", sum)
	if sum.Refused > 0 {
		return surveyRefused{sum.Refused}
	}
	return nil
}

// synced brings a file to the disk; a device or a pipe has none.
func synced(f *os.File) error {
	if info, err := f.Stat(); err != nil || !info.Mode().IsRegular() {
		return err
	}
	return f.Sync()
}

func (s *surveyCommand) inputs(c *command) ([]survey.Input, error) {
	var list []survey.Input
	piped := false
	for _, name := range s.Files {
		if name == "-" {
			if piped {
				return nil, usageError{"standard input (-) is given twice; give it once"}
			}
			piped = true
			list = append(list, survey.Input{Name: "standard input", Open: func() (io.ReadCloser, error) { return io.NopCloser(c.stdin), nil }})
			continue
		}
		info, err := os.Stat(name)
		if err != nil {
			return nil, cannotOpen(err)
		}
		if info.IsDir() {
			return nil, fileError{fmt.Errorf("cannot read %s: it is a folder; give files", name)}
		}
		list = append(list, survey.Input{Name: name, Open: func() (io.ReadCloser, error) {
			f, err := os.Open(name)
			if err != nil {
				return nil, cannotOpen(err)
			}
			return f, nil
		}})
	}
	return list, nil
}

// notAnInput refuses to write over what is being read.
func (s *surveyCommand) notAnInput() error {
	out, err := os.Stat(s.Output)
	if err != nil {
		return nil
	}
	for _, name := range s.Files {
		if in, err := os.Stat(name); err == nil && os.SameFile(in, out) {
			return usageError{fmt.Sprintf("-o %s is also an input; give another file", s.Output)}
		}
	}
	return nil
}

// open opens the output: a new or empty file, or with --resume one to go on with.
func (s *surveyCommand) open(csv bool, shard survey.Shard) (*os.File, survey.Mark, error) {
	fail := func(err error) (*os.File, survey.Mark, error) {
		return nil, survey.Mark{}, fileError{fmt.Errorf("cannot write %s: %w", s.Output, err)}
	}
	mode := os.O_RDWR | os.O_CREATE
	if info, err := os.Stat(s.Output); err == nil && !info.Mode().IsRegular() && !info.IsDir() {
		mode = os.O_WRONLY // a pipe opened for reading too would never be without a reader
	}
	f, err := os.OpenFile(s.Output, mode, 0o644)
	if err != nil {
		return fail(err)
	}
	info, err := f.Stat()
	if err != nil {
		f.Close()
		return fail(err)
	}
	if !s.Resume {
		if info.Mode().IsRegular() && info.Size() > 0 {
			f.Close()
			return nil, survey.Mark{}, usageError{fmt.Sprintf("%s exists and is not empty; give --resume to go on with it, or another file", filepath.Base(s.Output))}
		}
		return f, survey.Mark{}, nil
	}
	last, err := survey.Resume(f, csv, shard)
	if err != nil {
		f.Close()
		return fail(err)
	}
	return f, last, nil
}

// progress tells on a terminal how far a survey has come.
type progress struct {
	w     io.Writer
	start time.Time
	last  time.Time
	total int64 // lines of all files, 0 where not known
	live  bool
}

func newProgress(w io.Writer, files []string) *progress {
	p := &progress{w: w, start: time.Now()}
	f, ok := w.(*os.File)
	if !ok {
		return p
	}
	info, err := f.Stat()
	p.live = err == nil && info.Mode()&os.ModeCharDevice != 0
	if p.live {
		p.total = countLines(files)
	}
	return p
}

// countLines counts the lines of plain files, for the time left; 0 where one cannot be
// counted.
func countLines(files []string) int64 {
	var n int64
	for _, name := range files {
		info, err := os.Stat(name)
		if err != nil || !info.Mode().IsRegular() {
			return 0
		}
		switch filepath.Ext(name) {
		case ".gz", ".sdf", ".sd", ".mol":
			return 0
		}
		f, err := os.Open(name)
		if err != nil {
			return 0
		}
		r := bufio.NewReaderSize(f, 1<<20)
		for {
			part, err := r.ReadSlice('\n')
			if err == nil || err == io.EOF && len(part) > 0 {
				n++
			}
			if err != nil && err != bufio.ErrBufferFull {
				break
			}
		}
		f.Close()
	}
	return n
}

func (p *progress) tick(lines int) {
	if !p.live || time.Since(p.last) < time.Second/2 {
		return
	}
	p.last = time.Now()
	rate := float64(lines) / time.Since(p.start).Seconds()
	left := ""
	if p.total > int64(lines) && rate > 0 {
		left = fmt.Sprintf(", %s left", time.Duration(float64(p.total-int64(lines))/rate*float64(time.Second)).Round(time.Second))
	}
	fmt.Fprintf(p.w, "\r%d lines, %.0f a second%s   ", lines, rate, left)
}

func (p *progress) end() {
	if p.live {
		fmt.Fprint(p.w, "\r\x1b[K")
	}
}
