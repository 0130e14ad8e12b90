package reftable_test

import (
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"glassthread/materials/reftable"
)

// How a test holds a function against a table; in a test, t is its own.
func Example() {
	dir, err := os.MkdirTemp("", "reftable")
	if err != nil {
		panic(err)
	}
	defer os.RemoveAll(dir)
	file := filepath.Join(dir, "seventh.csv")
	table := "# 1/7 by hand\nn,value\n7,0.142857142857142857142857\n"
	if err := os.WriteFile(file, []byte(table), 0o600); err != nil {
		panic(err)
	}
	t := new(testing.T)
	var errors reftable.Errors
	for _, row := range reftable.Read(t, file, 1) {
		errors.Add(row.Relative("value", 1/row.Float("n")), row)
	}
	errors.Check(t, "a seventh", 1e-16)
	fmt.Println(errors.N, errors.Worst < 1e-16, t.Failed())
	// Output: 1 true false
}
