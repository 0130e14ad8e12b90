package snell

import (
	"math"

	"glassthread/materials/domain"
)

// QuarterWave returns a lossless film a quarter of a wavelength thick for light
// along the normal: wavelength/(4 index), with the vacuum wavelength in m.
func QuarterWave(index, wavelength float64) (Film, error) {
	const function = "snell.QuarterWave"
	if err := checkIndex(function, "index", index); err != nil {
		return Film{}, err
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return Film{}, err
	}
	thickness := wavelength / 4 / index
	if err := domain.Result(function, "thickness", thickness); err != nil {
		return Film{}, err
	}
	return Film{complex(index, 0), thickness}, nil
}

// AntiReflection returns the single film that, between indices n1 and n2, ends
// all reflection along the normal at a vacuum wavelength (m): a quarter wave of
// index sqrt(n1 n2) (Born and Wolf, section 1.6.4). Few real materials have that
// index; QuarterWave makes the film of one that does not, and Coated tells what
// it leaves.
func AntiReflection(n1, n2, wavelength float64) (Film, error) {
	const function = "snell.AntiReflection"
	if err := checkInterface(function, n1, n2, 0); err != nil {
		return Film{}, err
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return Film{}, err
	}
	return QuarterWave(math.Sqrt(n1*n2), wavelength)
}

// Coated returns the powers at the end of a fibre of index fibre that carries one
// coating, in a medium of index outside, along the normal at a vacuum wavelength
// (m). More films, other angles and the phases are Stack's.
func Coated(fibre float64, coating Film, outside, wavelength float64) (Powers, error) {
	const function = "snell.Coated"
	if err := checkIndex(function, "fibre", fibre); err != nil {
		return Powers{}, err
	}
	if err := checkComplexIndex(function, "coating.Index", coating.Index); err != nil {
		return Powers{}, err
	}
	if err := domain.NonNegative(function, "coating.Thickness", coating.Thickness, "m"); err != nil {
		return Powers{}, err
	}
	if err := checkIndex(function, "outside", outside); err != nil {
		return Powers{}, err
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return Powers{}, err
	}
	films := [1]Film{coating}
	c, err := Stack{Entrance: fibre, Films: films[:], Exit: complex(outside, 0)}.At(wavelength, 0)
	return c.S.Powers, err
}
