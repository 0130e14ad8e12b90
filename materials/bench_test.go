package materials

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// Asking any kind of medium for its index does not allocate, through the interface too.
func TestNoAllocation(t *testing.T) {
	for name, m := range kinds(t) {
		var err error
		for call, f := range map[string]func(){
			"Index":      func() { _, err = Index(m, 1e-6) },
			"GroupIndex": func() { _, err = GroupIndex(m, 1e-6) },
			"Taylor":     func() { _, err = m.Taylor(1e-6) },
		} {
			assert.Zero(t, testing.AllocsPerRun(100, f), "%s of %s", call, name)
			assert.NoError(t, err)
		}
	}
	var err error
	for name, f := range map[string]func(){
		"GermaniaSilica":           func() { _, err = GermaniaSilica(0.05) },
		"FluorineSilica":           func() { _, err = FluorineSilica(0.01) },
		"SilicaAt":                 func() { _, err = SilicaAt(300) },
		"SilicaThermoOptic.Change": func() { _, err = SilicaThermoOptic{}.Change(1e-6, 290, 300) },
		"LinearThermoOptic.Change": func() { _, err = WaterThermoOptic().Change(1e-6, 290, 300) },
		"GermaniaSilica Change":    func() { _, err = GermaniaSilicaThermoOptic{0.05}.Change(1e-6, 290, 300) },
		"GasThermoOptic.Change":    func() { _, err = AirThermoOptic().Change(1e-6, 290, 300) },
	} {
		assert.Zero(t, testing.AllocsPerRun(100, f), name)
		assert.NoError(t, err)
	}
}

var sink float64

func BenchmarkIndex(b *testing.B) {
	for _, name := range []string{"Sellmeier", "LorentzLorenz", "Gas", "Powers", "Table", "Constant", "Warmed"} {
		m := kinds(b)[name]
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for range b.N {
				n, err := Index(m, 1.5e-6)
				if err != nil {
					b.Fatal(err)
				}
				sink = n
			}
		})
	}
}

// A composition sweep makes a glass for every point.
func BenchmarkGermaniaSilica(b *testing.B) {
	b.ReportAllocs()
	for range b.N {
		g, err := GermaniaSilica(0.05)
		if err != nil {
			b.Fatal(err)
		}
		sink = g.Terms[0].A
	}
}

func BenchmarkFractionForIndex(b *testing.B) {
	e, err := Lookup("germania-silica")
	if err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for range b.N {
		sink, err = e.FractionForIndex(1.4495, 1.55e-6)
		if err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkNewTable(b *testing.B) {
	x := evenly(0.5e-6, 1.7e-6, 100)
	n := make([]float64, len(x))
	for i := range x {
		n[i] = indexAt(b, FusedSilica(), x[i])
	}
	b.ReportAllocs()
	for range b.N {
		if _, err := NewTable(x, n, Source{}); err != nil {
			b.Fatal(err)
		}
	}
}
