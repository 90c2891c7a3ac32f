package main

import (
	"bufio"
	"bytes"
	"context"
	"errors"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
	"time"
)

// asProgram makes the test binary behave as the program, so that signals and pipes meet a
// process of its own.
const asProgram = "LOBECAST_TEST_AS_PROGRAM"

func TestMain(m *testing.M) {
	if os.Getenv(asProgram) != "" {
		main()
	}
	os.Exit(m.Run())
}

// program is the program as a process of its own.
func program(t *testing.T, args ...string) *exec.Cmd {
	t.Helper()
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command(self, args...)
	cmd.Env = append(os.Environ(), asProgram+"=1")
	return cmd
}

// exitOf is the exit status of a process; -1 where a signal ended it.
func exitOf(t *testing.T, err error) int {
	t.Helper()
	var exit *exec.ExitError
	switch {
	case err == nil:
		return 0
	case errors.As(err, &exit):
		return exit.ExitCode()
	}
	t.Fatal(err)
	return 0
}

const brominations = "Cc1ccccc1>BrBr>Cc1ccc(Br)cc1 toluene\nCOc1ccccc1>BrBr>COc1ccc(Br)cc1 anisole\n"

// manyLines is a file of n thousand reactions.
func manyLines(t *testing.T, thousands int) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "in.rsmi")
	if err := os.WriteFile(path, []byte(strings.Repeat(brominations, 500*thousands)), 0o644); err != nil {
		t.Fatal(err)
	}
	return path
}

func TestSignalsEndASurveyWithWholeRecords(t *testing.T) {
	in := manyLines(t, 200)
	for _, sig := range []os.Signal{syscall.SIGINT, syscall.SIGTERM} {
		for _, form := range []string{"csv", "toml"} {
			out := filepath.Join(t.TempDir(), "out")
			cmd := program(t, "survey", in, "--as", form, "-o", out)
			var errs bytes.Buffer
			cmd.Stderr = &errs
			if err := cmd.Start(); err != nil {
				t.Fatal(err)
			}
			for wait := time.Now(); ; time.Sleep(2 * time.Millisecond) {
				if info, err := os.Stat(out); err == nil && info.Size() > 0 {
					break
				}
				if time.Since(wait) > 30*time.Second {
					t.Fatal("nothing was written")
				}
			}
			cmd.Process.Signal(sig)
			if code := exitOf(t, cmd.Wait()); code != exitInterrupted {
				t.Errorf("%v, %s: status %d: %s", sig, form, code, errs.String())
			}
			if !strings.Contains(errs.String(), "interrupted") {
				t.Errorf("%v, %s: standard error is %q", sig, form, errs.String())
			}
			text, err := os.ReadFile(out)
			if err != nil {
				t.Fatal(err)
			}
			end, begin := "\n", "\n"
			if form == "toml" {
				begin = "[[result]]"
			}
			records := strings.Count(string(text), begin)
			if !strings.HasSuffix(string(text), end) || records < 1 || records > 200000 {
				t.Errorf("%v, %s: %d records, the last ends with %q", sig, form, records, text[max(0, len(text)-20):])
			}
		}
	}
}

// A reader that goes away is no fault: status 0, and nothing on standard error.
func TestClosedPipeEndsQuietly(t *testing.T) {
	in := manyLines(t, 20)
	for _, args := range [][]string{
		{"survey", in, "--as", "csv"}, {"survey", in}, {"orbitals", strings.Repeat("C=C", 200)}, {"manual"},
	} {
		cmd := program(t, args...)
		var errs bytes.Buffer
		cmd.Stderr = &errs
		out, err := cmd.StdoutPipe()
		if err != nil {
			t.Fatal(err)
		}
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		bufio.NewReader(io.LimitReader(out, 64)).ReadString('\n')
		out.Close()
		if code := exitOf(t, cmd.Wait()); code != exitOK {
			t.Errorf("%s: status %d: %s", args[0], code, errs.String())
		}
		if errs.Len() > 0 {
			t.Errorf("%s: standard error is %q", args[0], errs.String())
		}
	}
}

func TestFullDisk(t *testing.T) {
	const full = "/dev/full"
	if _, err := os.Stat(full); err != nil {
		t.Logf("this system has no %s", full)
		return
	}
	route := filepath.Join("..", "..", "docs", "examples", "two-steps.toml")
	for _, args := range [][]string{
		{"sites", "c1ccccc1C", "-o", full}, {"review", route, "-o", full},
		{"survey", "-", "--as", "csv", "-o", full}, {"survey", "-", "-o", full},
	} {
		code, _, errs := call(t, strings.Repeat(brominations, 200), args...)
		if code != exitFile || !strings.Contains(errs, "no space left") {
			t.Errorf("%v: status %d: %s", args[0], code, errs)
		}
	}
	cmd := program(t, "sites", "c1ccccc1C")
	sink, err := os.OpenFile(full, os.O_WRONLY, 0)
	if err != nil {
		t.Fatal(err)
	}
	defer sink.Close()
	cmd.Stdout = sink
	if code := exitOf(t, cmd.Run()); code != exitFile {
		t.Errorf("standard output on a full disk: status %d", code)
	}
}

func TestSurveyToADevice(t *testing.T) {
	code, _, errs := call(t, brominations, "survey", "-", "--as", "csv", "-o", os.DevNull)
	if code != exitOK {
		t.Errorf("status %d: %s", code, errs)
	}
}

// breaking is an input that fails after its text, as a file on a lost share does.
type breaking struct{ text *strings.Reader }

func (b breaking) Read(p []byte) (int, error) {
	if b.text.Len() == 0 {
		return 0, errors.New("input/output error")
	}
	return b.text.Read(p)
}

func TestInputThatBreaksOff(t *testing.T) {
	var out, errs bytes.Buffer
	code := run(context.Background(), []string{"survey", "-", "--as", "csv"}, breaking{strings.NewReader(brominations)}, &out, &errs)
	if code != exitFile || !strings.Contains(errs.String(), "input/output error") {
		t.Errorf("status %d: %s", code, errs.String())
	}
	if !strings.Contains(out.String(), "anisole") {
		t.Errorf("the lines before the fault are lost: %s", out.String())
	}
}

func TestFilesThatVanish(t *testing.T) {
	dir := t.TempDir()
	first, second := filepath.Join(dir, "first.rsmi"), filepath.Join(dir, "second.rsmi")
	if err := os.WriteFile(first, []byte(brominations), 0o644); err != nil {
		t.Fatal(err)
	}
	code, out, errs := call(t, "", "survey", first, second, "--as", "csv")
	if code != exitFile || !strings.Contains(errs, "second.rsmi") || out != "" {
		t.Errorf("a file that is not there: status %d, %q, %s", code, out, errs)
	}
	// One that goes after the run began: a link whose target is taken away.
	c := &command{ctx: context.Background(), stdin: strings.NewReader(""), stdout: io.Discard, stderr: io.Discard}
	s := &surveyCommand{Files: []string{first}}
	inputs, err := s.inputs(c)
	if err != nil {
		t.Fatal(err)
	}
	os.Remove(first)
	if _, err := inputs[0].Open(); err == nil || !strings.Contains(err.Error(), "first.rsmi") {
		t.Errorf("a file that has gone: %v", err)
	}
}

func TestReadOnlyFolder(t *testing.T) {
	dir := t.TempDir()
	if err := os.Chmod(dir, 0o555); err != nil {
		t.Fatal(err)
	}
	defer os.Chmod(dir, 0o755)
	target := filepath.Join(dir, "out.toml")
	if os.Getuid() == 0 {
		// The superuser may write anywhere, but nobody may in a folder of the kernel.
		target = "/proc/self/out.toml"
	}
	for _, args := range [][]string{{"sites", "c1ccccc1C", "-o", target}, {"survey", "-", "-o", target}} {
		code, _, errs := call(t, brominations, args...)
		if code != exitFile || !strings.Contains(errs, target) {
			t.Errorf("%s: status %d: %s", args[0], code, errs)
		}
		if _, err := os.Stat(target); err == nil {
			t.Errorf("%s left a file", args[0])
		}
	}
}

// An interrupted review writes no report and leaves the earlier file as it was, or writes
// one that is whole.
func TestSignalLeavesNoHalfReport(t *testing.T) {
	dir := t.TempDir()
	route, out := filepath.Join(dir, "route.toml"), filepath.Join(dir, "out.toml")
	os.WriteFile(route, []byte(strings.Repeat("[[step]]\nreaction = \"COc1ccc2[nH]ccc2c1>BrBr>COc1ccc2[nH]cc(Br)c2c1\"\n", 400)), 0o644)
	os.WriteFile(out, []byte("before\n"), 0o644)
	cmd := program(t, "review", route, "-o", out)
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	time.Sleep(150 * time.Millisecond)
	cmd.Process.Signal(syscall.SIGINT)
	code := exitOf(t, cmd.Wait())
	text, err := os.ReadFile(out)
	if err != nil {
		t.Fatal(err)
	}
	if string(text) != "before\n" {
		if again, _, errs := call(t, "", "page", out); again != exitOK {
			t.Errorf("the report that was written is not whole: %s", errs)
		}
	}
	// -1: the signal came while the process still started.
	if code != exitInterrupted && code != exitOK && code != -1 {
		t.Errorf("status %d", code)
	}
	left, _ := filepath.Glob(filepath.Join(dir, ".*"))
	if len(left) > 0 {
		t.Errorf("left behind: %v", left)
	}
}

// What was judged before an interrupt is written, to a file too.
func TestInterruptedReviewIsWritten(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	out := filepath.Join(t.TempDir(), "report.toml")
	var stdout, stderr bytes.Buffer
	code := run(ctx, []string{"review", "../../testdata/routes/quinone.toml", "-o", out}, strings.NewReader(""), &stdout, &stderr)
	if code != exitInterrupted {
		t.Errorf("status %d: %s", code, stderr.String())
	}
	data, err := os.ReadFile(out)
	if err != nil || !strings.Contains(string(data), `kind = "review"`) {
		t.Errorf("%v: %.200s", err, data)
	}
}
