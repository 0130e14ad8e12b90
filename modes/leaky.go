package modes

import (
	"errors"
	"fmt"
	"math"
	"math/cmplx"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
	"glassthread/numap"
)

// ErrNoResonance says that a mode beyond its cut-off leaks too fast to be called a mode.
var ErrNoResonance = radial.ErrNoResonance

// LeakyMode is a scalar (LP) mode at one wavelength on either side of its cut-off. With the
// time factor exp(-i omega t) its field goes as exp(i k Index z), k = 2 pi/wavelength: a positive
// imaginary part of Index is a loss.
type LeakyMode struct {
	L, M int
	// V is (2 pi a/x) sqrt(n^2 - n2^2) with the highest index n of the profile and its
	// outermost radius a, as in RadialLP.Solve; where no index exceeds the cladding's, the
	// largest n2^2 - n^2 stands instead.
	V float64
	// Index is the complex effective index, from Index^2 = n2^2 + (w/(k a))^2. Its imaginary
	// part has a relative accuracy of its own, however small it is.
	Index complex128
	// Loss is the confinement loss, (20/ln 10) k Im(Index) (dB/m); 0 for a guided mode.
	Loss float64
}

// Leaky returns the mode at a vacuum wavelength (m) on either side of its cut-off: as Solve
// finds it where it is guided, and beyond that as a leaky mode, whose field in the cladding is
// continued from K_l to an outgoing wave H_l^(1) (A. W. Snyder and J. D. Love, Optical
// Waveguide Theory, 1983, chapter 24). Fibres whose modes are all leaky, their outer
// cladding or coating having the highest index, are included.
//
// The loss is that of leakage alone: glasses have real indices here, bends and absorption
// come on top, and the cladding is taken as unbounded, so that nothing that leaves comes
// back. Layers whose glass is the cladding's are part of it.
//
// M counts from the highest effective index, guided modes first, and continues across
// cut-off. Modes of a layer outside the barrier count too.
//
// The error matches ErrNoResonance where the mode leaks too fast to be one, or cannot be
// told from its neighbours (see radial.Leaky, which also states the accuracy): losses of many
// kilodecibels a metre, and for L = 0 a stretch next to the cut-off, typically a thousandth
// of its wavelength. It matches ErrCutoff within rounding of cut-off, and
// numap.ErrNotGuiding where the index is the same everywhere. Glasses and radii are refused
// as by Solve.
func (m RadialLP) Leaky(wavelength float64) (LeakyMode, error) {
	const function = "modes.RadialLP.Leaky"
	if m.Fibre == nil {
		return LeakyMode{}, errNoFibre
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return LeakyMode{}, err
	}
	s, err := m.Fibre.section(function, wavelength)
	if err != nil {
		return LeakyMode{}, err
	}
	if !(s.highest > 0) {
		// Any other measure of the contrast serves as the unit of f.
		if s.highest, err = s.largest(); err != nil {
			return LeakyMode{}, err
		}
	}
	p, err := s.problem(function, wavelength)
	if err != nil {
		if errors.Is(err, numap.ErrNotGuiding) {
			err = &domain.Error{Func: function, Argument: "wavelength", Value: wavelength,
				Allowed: "where some layer's index differs from the cladding's (m)", Kind: numap.ErrNotGuiding}
		}
		return LeakyMode{}, err
	}
	solved, err := radial.Leaky(p.profile, p.v, m.L, m.M)
	if err = p.fail(err); err != nil {
		return LeakyMode{}, fmt.Errorf("%v at wavelength %v m: %w", m, wavelength, err)
	}
	mode := LeakyMode{L: m.L, M: m.M, V: p.v}
	lambda := solved.Lambda
	if real(lambda) > 0 {
		// imag(lambda) is 0.
		mode.Index = complex(p.effective(taylor.Constant(real(lambda)))[0], 0)
		return mode, domain.Result(function, "effective index", real(mode.Index))
	}
	n2, unit := s.cladding[0], p.scale[0]
	above := complex(real(lambda)/unit, imag(lambda)/unit)
	square := complex(n2*n2, 0) + above
	if !(real(square) > 0) {
		return LeakyMode{}, &domain.Error{Func: function, Argument: "wavelength", Value: wavelength,
			Allowed: "where the mode propagates (m)", Kind: ErrNoResonance}
	}
	n := real(complex(n2, 0) + above/(complex(n2, 0)+cmplx.Sqrt(square)))
	loss := imag(above) / (2 * n)
	mode.Index = complex(n, loss)
	mode.Loss = 20 / math.Ln10 * (2 * math.Pi / wavelength) * loss
	return mode, domain.Result(function, "loss", mode.Loss)
}

// largest returns the largest modulus of excess that it finds.
func (s section) largest() (float64, error) {
	most := 0.0
	for i, p := range s.pieces {
		for k := 0; k <= profileSamples; k++ {
			e, err := s.excess(i, p.From+(p.To-p.From)*float64(k)/profileSamples)
			if err != nil {
				return 0, err
			}
			most = math.Max(most, math.Abs(e[0]))
		}
	}
	return most, nil
}
