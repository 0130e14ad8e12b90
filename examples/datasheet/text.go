package main

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"text/tabwriter"

	"glassthread/dispersion"
	"glassthread/materials"
)

const degrees = 180 / math.Pi

// writeText writes the sheet in the units of the trade, with at most so many modes at
// each wavelength (0: all).
func writeText(out io.Writer, r *report, most int) error {
	w := tabwriter.NewWriter(out, 0, 0, 3, ' ', 0)
	line := func(cells ...string) { fmt.Fprintln(w, strings.Join(cells, "\t")) }
	// heading starts a section with the wavelengths above its columns.
	heading := func(title string) {
		cells := []string{title}
		for _, a := range r.At {
			cells = append(cells, fmt.Sprintf("%.7g nm", a.Wavelength*1e9))
		}
		line("")
		line(cells...)
	}
	// columns writes one figure for each wavelength.
	columns := func(name, form string, figure func(*wavelength) float64) {
		cells := []string{"  " + name}
		for i := range r.At {
			cells = append(cells, fmt.Sprintf(form, figure(&r.At[i])))
		}
		line(cells...)
	}
	// fundamental writes one figure of LP01 for each wavelength.
	fundamental := func(name, form string, unit float64, figure func(*mode) float64) {
		columns(name, form, func(a *wavelength) float64 { return figure(&a.Modes[0]) / unit })
	}

	line(printable(r.Recipe.Name))
	line("  core", r.Recipe.Core.String())
	line("  cladding", r.Recipe.Cladding.String())
	line("  core radius", fmt.Sprintf("%.4g um", r.Recipe.CoreRadius))
	line("  temperature", fmt.Sprintf("%.4g C", r.Recipe.Temperature))
	line("  glass data hold", fmt.Sprintf("%.0f to %.0f nm", r.Wavelength.From*1e9, r.Wavelength.To*1e9))

	heading("Glass and light at the end face")
	columns("core index", "%.7f", func(a *wavelength) float64 { return a.Core })
	columns("cladding index", "%.7f", func(a *wavelength) float64 { return a.Cladding })
	columns("relative index difference (%)", "%.4f", func(a *wavelength) float64 { return a.Delta * 100 })
	columns("numerical aperture", "%.5f", func(a *wavelength) float64 { return a.NA })
	columns("acceptance angle in air (deg from axis)", "%.3f", func(a *wavelength) float64 { return a.AcceptanceAngle * degrees })
	columns("critical angle at the core wall (deg)", "%.3f", func(a *wavelength) float64 { return a.CriticalAngle * degrees })
	columns("V", "%.5f", func(a *wavelength) float64 { return a.V })

	heading("LP01, the fundamental mode")
	fundamental("effective index", "%.7f", 1, func(m *mode) float64 { return m.Index })
	fundamental("group index", "%.7f", 1, func(m *mode) float64 { return m.Group })
	fundamental("group delay (ns/km)", "%.3f", 1e-12, func(m *mode) float64 { return m.Delay })
	fundamental("share of power in the core (%)", "%.2f", 0.01, func(m *mode) float64 { return m.CorePower })
	fundamental("dispersion D (ps/(nm km))", "%+.4f", dispersion.PsPerNmKm, func(m *mode) float64 { return m.D })
	fundamental("  material part", "%+.4f", dispersion.PsPerNmKm, func(m *mode) float64 { return m.Material })
	fundamental("  waveguide part", "%+.4f", dispersion.PsPerNmKm, func(m *mode) float64 { return m.Waveguide })
	fundamental("  profile part", "%+.4f", dispersion.PsPerNmKm, func(m *mode) float64 { return m.Profile })
	fundamental("slope of D (ps/(nm^2 km))", "%.5f", dispersion.PsPerNm2Km, func(m *mode) float64 { return m.Slope })
	fundamental("beta2 (ps^2/km)", "%+.4f", 1e-27, func(m *mode) float64 { return m.Beta2 })

	line("")
	zeros := make([]string, len(r.Zeros))
	for i, x := range r.Zeros {
		zeros[i] = fmt.Sprintf("%.3f nm", x*1e9)
	}
	if len(zeros) == 0 {
		zeros = []string{"none"}
	}
	line("Zero dispersion of LP01", strings.Join(zeros, ", "))
	searched := make([]string, len(r.Searched))
	for i, s := range r.Searched {
		searched[i] = fmt.Sprintf("from %.0f to %.0f nm", s.From*1e9, s.To*1e9)
	}
	if len(searched) == 0 {
		searched = []string{"nowhere: the data end before 800 nm"}
	}
	line("  (searched " + strings.Join(searched, " and ") + ", where the core guides)")

	line("")
	line("Cut-off wavelengths", "nm", "V")
	line("  LP01", "none", "0")
	var beyond []string
	for _, c := range r.Cutoffs {
		if c.Note != "" {
			beyond = append(beyond, c.Mode)
			continue
		}
		line("  "+c.Mode, fmt.Sprintf("%.3f", c.Wavelength*1e9), fmt.Sprintf("%.5f", c.V))
	}
	if len(beyond) > 0 {
		line("")
		line("  outside the range of the glass data: " + strings.Join(beyond, ", "))
	}
	for _, a := range r.At {
		total := 0
		for _, m := range a.Modes {
			total += m.Degeneracy
		}
		line("")
		line(fmt.Sprintf("Modes guided at %.7g nm: %d, with polarisations and orientations %d", a.Wavelength*1e9, len(a.Modes), total))
		line("  mode", "degeneracy", "effective index", "group index", "b", "D (ps/(nm km))")
		for i, m := range a.Modes {
			if most > 0 && i == most {
				line(fmt.Sprintf("  and %d more", len(a.Modes)-most))
				break
			}
			line("  "+m.Mode, fmt.Sprint(m.Degeneracy), fmt.Sprintf("%.7f", m.Index), fmt.Sprintf("%.7f", m.Group),
				fmt.Sprintf("%.5f", m.B), fmt.Sprintf("%+.4f", m.D/dispersion.PsPerNmKm))
		}
	}
	for _, note := range r.Notes {
		line("")
		for _, part := range wrap("Note: "+note, 96) {
			line(part)
		}
	}
	return w.Flush()
}

// printable writes out as Go does what a terminal would not print as it stands.
func printable(text string) string {
	var b strings.Builder
	for _, r := range text {
		if strconv.IsPrint(r) {
			b.WriteRune(r)
		} else {
			b.WriteString(strings.Trim(strconv.QuoteRune(r), "'"))
		}
	}
	return b.String()
}

// wrap breaks a text between words into lines of at most so many bytes, where the words
// allow it.
func wrap(text string, width int) []string {
	var lines []string
	for _, word := range strings.Fields(text) {
		if last := len(lines) - 1; last >= 0 && len(lines[last])+1+len(word) <= width {
			lines[last] += " " + word
		} else {
			lines = append(lines, word)
		}
	}
	return lines
}

func writeGlasses(out io.Writer) error {
	w := tabwriter.NewWriter(out, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "glass\twavelengths (um)\tmole fraction\tindex at (C)\tand at (C)\tcomposition\tsource")
	for _, e := range materials.Catalogue() {
		fraction := "fixed"
		if e.Fractions != (materials.Range{}) {
			fraction = fmt.Sprintf("%v to %v", e.Fractions.From, e.Fractions.To)
		}
		source := e.Source.Citation
		if e.Source.FromMemory {
			source += " (from memory)"
		}
		warm := "not known"
		if t := e.Temperatures; t.From < t.To {
			warm = fmt.Sprintf("%.4g to %.4g", inCelsius(t.From), inCelsius(t.To))
		}
		fmt.Fprintf(w, "%s\t%.4g to %.4g\t%s\t%.4g\t%s\t%s\t%s\n", e.Name, e.Wavelengths.From*1e6, e.Wavelengths.To*1e6,
			fraction, inCelsius(e.Temperature), warm, e.Composition, source)
	}
	return w.Flush()
}
