// Package reftable reads the reference tables under testdata and measures errors
// against them. It serves tests only.
//
// A table is a CSV file: comment lines that begin with # and say what it is, how it
// is made and from what source; a line of column names; rows. Inputs are float64 in
// full, results decimals of 25 digits or so made by arbitrary-precision arithmetic.
package reftable

import (
	"bufio"
	"math"
	"math/big"
	"os"
	"strconv"
	"strings"
	"testing"
)

// Row is one row of a table.
type Row struct {
	t      testing.TB
	fields []string
	column map[string]int
	line   int
	file   string
}

// Read returns the rows of a table, and fails the test when it cannot or when there
// are fewer than least.
func Read(t testing.TB, file string, least int) []Row {
	t.Helper()
	f, err := os.Open(file)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var rows []Row
	var column map[string]int
	scanner := bufio.NewScanner(f)
	for line := 1; scanner.Scan(); line++ {
		text := scanner.Text()
		if text == "" || strings.HasPrefix(text, "#") {
			continue
		}
		fields := strings.Split(text, ",")
		if column == nil {
			column = map[string]int{}
			for i, name := range fields {
				column[name] = i
			}
			continue
		}
		if len(fields) != len(column) {
			t.Fatalf("%s:%d: %d fields, want %d", file, line, len(fields), len(column))
		}
		rows = append(rows, Row{t, fields, column, line, file})
	}
	if err := scanner.Err(); err != nil {
		t.Fatal(err)
	}
	if len(rows) < least {
		t.Fatalf("%s has %d rows, want at least %d", file, len(rows), least)
	}
	return rows
}

// String returns the row's place and fields, for messages.
func (r Row) String() string {
	text := strings.Join(r.fields, ",")
	return r.file + ":" + strconv.Itoa(r.line) + ": " + text[:min(len(text), 160)]
}

// Text returns a field as it stands.
func (r Row) Text(name string) string {
	r.t.Helper()
	i, ok := r.column[name]
	if !ok {
		r.t.Fatalf("%s has no column %q", r.file, name)
	}
	return r.fields[i]
}

// Float returns a field as the nearest float64.
func (r Row) Float(name string) float64 {
	r.t.Helper()
	x, err := strconv.ParseFloat(r.Text(name), 64)
	if err != nil && !strings.Contains(err.Error(), "range") {
		r.t.Fatalf("%v: %s: %v", r, name, err)
	}
	return x
}

// Int returns a field as a whole number.
func (r Row) Int(name string) int {
	r.t.Helper()
	n, err := strconv.Atoi(r.Text(name))
	if err != nil {
		r.t.Fatalf("%v: %s: %v", r, name, err)
	}
	return n
}

// Difference returns got less the field's exact value, rounded once.
func (r Row) Difference(name string, got float64) float64 {
	r.t.Helper()
	want, _, err := big.ParseFloat(r.Text(name), 10, 240, big.ToNearestEven)
	if err != nil {
		r.t.Fatalf("%v: %s: %v", r, name, err)
	}
	if math.IsNaN(got) || math.IsInf(got, 0) {
		return math.NaN()
	}
	d, _ := want.Sub(big.NewFloat(got), want).Float64()
	return d
}

// Relative returns the relative error of got against the field's exact value, or
// its absolute error where that is zero.
func (r Row) Relative(name string, got float64) float64 {
	r.t.Helper()
	d := math.Abs(r.Difference(name, got))
	if want := math.Abs(r.Float(name)); want != 0 {
		return d / want
	}
	return d
}

// Errors keeps the mean and the worst of many errors.
type Errors struct {
	Mean, Worst float64
	N           int
	Where       Row
}

// Add counts one error, at a row. A NaN counts as the worst there is.
func (e *Errors) Add(size float64, where Row) {
	e.N++
	e.Mean += (size - e.Mean) / float64(e.N)
	if size > e.Worst || math.IsNaN(size) {
		e.Worst, e.Where = size, where
	}
}

// Check logs the errors and fails the test if the worst exceeds the limit or none
// was counted.
func (e *Errors) Check(t testing.TB, what string, limit float64) {
	t.Helper()
	t.Logf("%s: mean %.2g, worst %.2g, limit %.2g, %d values; worst at %v", what, e.Mean, e.Worst, limit, e.N, e.Where)
	if e.N == 0 || !(e.Worst <= limit) {
		t.Errorf("%s: worst error %.3g exceeds %.3g at %v", what, e.Worst, limit, e.Where)
	}
}

// ULP returns the error of got in units in the last place of the field's exact value.
func (r Row) ULP(name string, got float64) float64 {
	r.t.Helper()
	want := math.Abs(r.Float(name))
	return math.Abs(r.Difference(name, got)) / (math.Nextafter(want, math.Inf(1)) - want)
}
