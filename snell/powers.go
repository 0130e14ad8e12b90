package snell

import (
	"errors"
	"math"

	"glassthread/materials/domain"
)

// ErrNoPower says that no power at all arrives, so that a loss in decibels is
// infinite.
var ErrNoPower = errors.New("no power; the loss in decibels is infinite")

// Powers holds shares of the incident power, each from 0 to 1. They sum to 1.
// The zero Powers is not a valid set, and its methods refuse it.
type Powers struct {
	Reflectance   float64
	Transmittance float64
	Absorptance   float64 // in the films, not in the medium behind them
}

// ReturnLoss returns -10 log10(Reflectance) in dB, above or equal to 0. It is
// infinite where nothing is reflected; the error then matches ErrNoPower.
func (p Powers) ReturnLoss() (float64, error) {
	const function = "snell.Powers.ReturnLoss"
	if err := p.check(function); err != nil {
		return 0, err
	}
	return decibels(function, "Reflectance", p.Reflectance, p.Transmittance+p.Absorptance)
}

// InsertionLoss returns -10 log10(Transmittance) in dB, above or equal to 0. It
// is infinite where nothing is transmitted; the error then matches ErrNoPower.
func (p Powers) InsertionLoss() (float64, error) {
	const function = "snell.Powers.InsertionLoss"
	if err := p.check(function); err != nil {
		return 0, err
	}
	return decibels(function, "Transmittance", p.Transmittance, p.Reflectance+p.Absorptance)
}

// check allows what rounding or a few printed digits may do to the sum.
func (p Powers) check(function string) error {
	for _, part := range [...]struct {
		name  string
		value float64
	}{{"Reflectance", p.Reflectance}, {"Transmittance", p.Transmittance}, {"Absorptance", p.Absorptance}} {
		if !(part.value >= 0 && part.value <= 1) {
			return domain.Within(function, part.name, part.value, 0, 1, "")
		}
	}
	if sum := p.Reflectance + p.Transmittance + p.Absorptance; math.Abs(sum-1) > 1e-6 {
		return &domain.Error{Func: function, Argument: "sum of the powers", Value: sum, Allowed: "1 to within 1e-6"}
	}
	return nil
}

// decibels takes a share and the rest of the power, and works from the smaller.
func decibels(function, name string, share, rest float64) (float64, error) {
	if share == 0 {
		return 0, &domain.Error{Func: function, Argument: name, Value: 0, Allowed: "above 0", Kind: ErrNoPower}
	}
	if share < 0.5 {
		return -10 * math.Log10(share), nil
	}
	return math.Abs(10 / math.Ln10 * math.Log1p(-rest)), nil
}

// Polarised holds what happens to a wave of one polarisation: the amplitudes
// (phase and all) of the reflected and the transmitted electric field over that
// of the incident one, and the shares of its power.
type Polarised struct {
	Reflection, Transmission complex128
	Powers
}

// Coefficients holds what happens to the two polarisations: S with the electric
// field across the plane of incidence (TE), P with it in that plane (TM).
type Coefficients struct{ S, P Polarised }

// Unpolarised returns the shares of power for unpolarised light, or light
// polarised at 45 degrees: the mean of the two polarisations.
func (c Coefficients) Unpolarised() Powers {
	return Powers{
		Reflectance:   (c.S.Reflectance + c.P.Reflectance) / 2,
		Transmittance: (c.S.Transmittance + c.P.Transmittance) / 2,
		Absorptance:   (c.S.Absorptance + c.P.Absorptance) / 2,
	}
}

// lossless returns the powers where nothing is absorbed: each of the two that is
// small is used as it is, and the other is what remains.
func lossless(reflectance, transmittance float64) Powers {
	if reflectance < transmittance {
		return Powers{Reflectance: reflectance, Transmittance: 1 - reflectance}
	}
	return Powers{Reflectance: 1 - transmittance, Transmittance: transmittance}
}

// absorbing returns the powers with the absorptance as what remains of 1. If
// rounding leaves less than nothing, the larger power gives way.
func absorbing(reflectance, transmittance float64) Powers {
	if reflectance > transmittance {
		reflectance = math.Min(reflectance, 1-transmittance)
	} else {
		transmittance = math.Min(transmittance, 1-reflectance)
	}
	return Powers{reflectance, transmittance, math.Max(0, 1-reflectance-transmittance)}
}

func norm(z complex128) float64 { return real(z)*real(z) + imag(z)*imag(z) }

func scale(x float64, z complex128) complex128 { return complex(x*real(z), x*imag(z)) }

func (c Coefficients) finite() bool { return c.S.finite() && c.P.finite() }

func (p Polarised) finite() bool {
	sum := math.Abs(real(p.Reflection)) + math.Abs(imag(p.Reflection)) +
		math.Abs(real(p.Transmission)) + math.Abs(imag(p.Transmission)) +
		p.Reflectance + p.Transmittance + p.Absorptance
	return sum <= math.MaxFloat64
}
