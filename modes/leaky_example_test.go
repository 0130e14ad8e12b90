package modes_test

import (
	"errors"
	"fmt"

	"glassthread/materials"
	"glassthread/modes"
)

// The invented pigtail of the Tarnwater buoys in a version with a fluorine trench: how much of
// the second mode is left after a metre.
func ExampleRadialLP_Leaky() {
	core, err := materials.GermaniaSilicaBySunak(0.035)
	if err != nil {
		fmt.Println(err)
		return
	}
	trench, err := materials.FluorineSilica(0.01)
	if err != nil {
		fmt.Println(err)
		return
	}
	silica := materials.FusedSilica()
	fibre := modes.Layered{
		Layers: []modes.Layer{
			{Outer: 4.1e-6, Glass: core},
			{Outer: 7e-6, Glass: silica},
			{Outer: 14e-6, Glass: trench},
		},
		Cladding: silica,
	}
	for _, x := range []float64{1.20e-6, 1.26e-6, 1.31e-6, 1.36e-6} {
		mode, err := fibre.LP(1, 1).Leaky(x)
		if errors.Is(err, modes.ErrNoResonance) {
			fmt.Printf("%.0f nm: gone\n", x*1e9)
			continue
		}
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf("%.0f nm: n %.6f, %.3g dB/m\n", x*1e9, real(mode.Index), mode.Loss)
	}
	// Output:
	// 1200 nm: n 1.448306, 0 dB/m
	// 1260 nm: n 1.447330, 10.4 dB/m
	// 1310 nm: n 1.446526, 66.1 dB/m
	// 1360 nm: n 1.445728, 154 dB/m
}

// A core and cladding in a coating of higher index: all modes leak.
func ExampleLeakyMode() {
	fibre := modes.Layered{
		Layers: []modes.Layer{
			{Outer: 4.1e-6, Glass: materials.Constant(1.4497)},
			{Outer: 30e-6, Glass: materials.Constant(1.4440)},
		},
		Cladding: materials.Constant(1.48), // the coating
	}
	mode, err := fibre.LP(0, 1).Leaky(1.55e-6)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.7f, %.3g dB/km\n", real(mode.Index), mode.Loss*1000)
	// Output:
	// 1.4466131, 0.552 dB/km
}
