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

	"glassthread/materials"
)

const usage = `Prints the numbers of a step-index fibre from its recipe.

Usage: datasheet [options]

Without options it describes an invented fibre, the pigtail of the Tarnwater
buoys. Options change single entries of that recipe, or of the one read with
-recipe. Exit code 0 when the sheet was printed, 1 when it could not be written,
2 when the input was wrong.

Options:
  -recipe FILE          read the recipe from a JSON file (see below)
  -core GLASS           glass of the core, a name that -glasses lists
  -fraction X           mole fraction of the dopant in the core, 0 to 1
  -cladding GLASS       glass of the cladding
  -cladding-fraction X  mole fraction of the dopant in the cladding
  -radius R             core radius in micrometres
  -temperature T        temperature of the fibre in degrees Celsius; a glass
                        whose behaviour is not known is taken at its own, with
                        a note
  -wavelengths LIST     vacuum wavelengths in nanometres, with commas between
  -modes N              list at most N modes at each wavelength in the text form
                        (default 12; 0 lists all)
  -format FORM          text (default), json or csv; the last two list all modes
                        and are in SI units (m, s, rad). csv has a row for each
                        mode at each wavelength; it leaves out cut-offs, zeros
                        of dispersion and notes, which json has
  -glasses              list the glasses with their ranges, temperatures and
                        sources, and stop

Glasses, as -glasses describes them:

%s
A recipe file holds any of these entries; one that is missing keeps its value
from the invented fibre:

%s
`

func main() { os.Exit(run(os.Args[1:], os.Stdout, os.Stderr)) }

// run returns the exit code.
func run(args []string, out, errOut io.Writer) int {
	write, err := sheet(args)
	if errors.Is(err, flag.ErrHelp) {
		write, err = writeHelp, nil
	}
	code := 2
	if err == nil {
		code = 1
		err = write(out)
	}
	if err == nil {
		return 0
	}
	fmt.Fprintln(errOut, "datasheet:", printable(err.Error()))
	return code
}

// writeHelp writes the usage with the glasses' names, as many to a line as fit.
func writeHelp(out io.Writer) error {
	var names []string
	for _, e := range materials.Catalogue() {
		names = append(names, e.Name)
	}
	var list strings.Builder
	for _, line := range wrap(strings.Join(names, ", "), 76) {
		fmt.Fprintln(&list, "  "+line)
	}
	_, err := fmt.Fprintf(out, usage, list.String(), demo().json())
	return err
}

// sheet returns what writes the output that the arguments ask for. Its error is one of
// the input.
func sheet(args []string) (func(io.Writer) error, error) {
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
		return nil, err
	}
	if flags.NArg() > 0 {
		return nil, fmt.Errorf("unexpected argument %q; -h shows the options", flags.Arg(0))
	}
	if *glasses {
		return writeGlasses, nil
	}
	write, ok := map[string]func(io.Writer, *report) error{
		"text": func(w io.Writer, r *report) error { return writeText(w, r, *most) },
		"json": writeJSON,
		"csv":  writeCSV,
	}[*format]
	if !ok {
		return nil, fmt.Errorf("-format = %q: must be text, json or csv", *format)
	}
	if *most < 0 {
		return nil, fmt.Errorf("-modes = %d: must be at least 0", *most)
	}

	r := demo()
	if *file != "" {
		var err error
		if r, err = readRecipe(*file); err != nil {
			return nil, err
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
		return nil, bad
	}
	rep, err := r.report()
	if err != nil {
		return nil, err
	}
	return func(out io.Writer) error { return write(out, rep) }, nil
}

// list reads numbers with commas between.
func list(text string) ([]float64, error) {
	var numbers []float64
	for _, part := range strings.Split(text, ",") {
		if strings.TrimSpace(part) == "" {
			return nil, fmt.Errorf("-wavelengths = %q: a number is missing before, between or after the commas", text)
		}
		x, err := strconv.ParseFloat(strings.TrimSpace(part), 64)
		if err != nil {
			return nil, fmt.Errorf("-wavelengths: %q is not a number of nanometres", strings.TrimSpace(part))
		}
		numbers = append(numbers, x)
	}
	return numbers, nil
}
