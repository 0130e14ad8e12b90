// Datasheet prints the numbers of a step-index fibre from its recipe: glasses, core
// radius and temperature.
//
//	go run ./examples/datasheet
//	go run ./examples/datasheet -fraction 0.05 -radius 3.2 -wavelengths 980,1550
//	go run ./examples/datasheet -recipe fibre.json -format csv
//
// Without arguments it takes an invented fibre, the pigtail of the Tarnwater buoys.
package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"strconv"
	"strings"
)

const usage = `Prints the numbers of a step-index fibre from its recipe.

Usage: datasheet [options]

Without options it describes an invented fibre, the pigtail of the Tarnwater
buoys. Options change single entries of that recipe, or of the one read with
-recipe. Exit code 0 when the sheet was printed, 2 when the input was wrong.

Options:
  -recipe FILE          read the recipe from a JSON file (see below)
  -core GLASS           glass of the core, a name of the list below
  -fraction X           mole fraction of the dopant in the core, 0 to 1
  -cladding GLASS       glass of the cladding
  -cladding-fraction X  mole fraction of the dopant in the cladding
  -radius R             core radius in micrometres
  -temperature T        temperature of the fibre in degrees Celsius
  -wavelengths LIST     vacuum wavelengths in nanometres, with commas between
  -modes N              list at most N modes at each wavelength in the text form
                        (default 12; 0 lists all)
  -format FORM          text (default), json or csv; the last two list all modes
                        and are in SI units (m, s, rad)
  -glasses              list the glasses, their ranges and sources, and stop

A recipe file holds any of these entries; one that is missing keeps its value
from the invented fibre:

%s
`

func main() { os.Exit(run(os.Args[1:], os.Stdout, os.Stderr)) }

// run returns the exit code.
func run(args []string, out, errOut io.Writer) int {
	err := sheet(args, out)
	switch {
	case err == nil:
		return 0
	case errors.Is(err, flag.ErrHelp):
		fmt.Fprintf(out, usage, demo().json())
		return 0
	}
	fmt.Fprintln(errOut, "datasheet:", err)
	return 2
}

func sheet(args []string, out io.Writer) error {
	flags := flag.NewFlagSet("datasheet", flag.ContinueOnError)
	flags.SetOutput(io.Discard)
	file := flags.String("recipe", "", "")
	core := flags.String("core", "", "")
	fraction := flags.Float64("fraction", 0, "")
	cladding := flags.String("cladding", "", "")
	claddingFraction := flags.Float64("cladding-fraction", 0, "")
	radius := flags.Float64("radius", 0, "")
	temperature := flags.Float64("temperature", 0, "")
	wavelengths := flags.String("wavelengths", "", "")
	most := flags.Int("modes", 12, "")
	format := flags.String("format", "text", "")
	glasses := flags.Bool("glasses", false, "")
	if err := flags.Parse(args); err != nil {
		return err
	}
	if flags.NArg() > 0 {
		return fmt.Errorf("unexpected argument %q; -h shows the options", flags.Arg(0))
	}
	if *glasses {
		return writeGlasses(out)
	}
	write, ok := map[string]func(io.Writer, *report) error{
		"text": func(w io.Writer, r *report) error { return writeText(w, r, *most) },
		"json": writeJSON,
		"csv":  writeCSV,
	}[*format]
	if !ok {
		return fmt.Errorf("-format = %q: must be text, json or csv", *format)
	}
	if *most < 0 {
		return fmt.Errorf("-modes = %d: must be at least 0", *most)
	}

	r := demo()
	if *file != "" {
		var err error
		if r, err = readRecipe(*file); err != nil {
			return err
		}
	}
	var bad error
	flags.Visit(func(f *flag.Flag) {
		switch f.Name {
		case "core":
			r.Core = glass{Glass: *core}
		case "cladding":
			r.Cladding = glass{Glass: *cladding}
		}
	})
	flags.Visit(func(f *flag.Flag) { // after the glasses
		switch f.Name {
		case "fraction":
			r.Core.Fraction = *fraction
		case "cladding-fraction":
			r.Cladding.Fraction = *claddingFraction
		case "radius":
			r.CoreRadius = *radius
		case "temperature":
			r.Temperature = *temperature
		case "wavelengths":
			r.Wavelengths, bad = list(*wavelengths)
		}
		if f.Name != "recipe" && f.Name != "format" && f.Name != "modes" && f.Name != "temperature" && f.Name != "wavelengths" {
			r.Name = "A fibre of your own"
		}
	})
	if bad != nil {
		return bad
	}
	rep, err := r.report()
	if err != nil {
		return err
	}
	return write(out, rep)
}

// list reads numbers with commas between.
func list(text string) ([]float64, error) {
	var numbers []float64
	for _, part := range strings.Split(text, ",") {
		x, err := strconv.ParseFloat(strings.TrimSpace(part), 64)
		if err != nil {
			return nil, fmt.Errorf("-wavelengths: %q is not a number of nanometres", part)
		}
		numbers = append(numbers, x)
	}
	return numbers, nil
}
