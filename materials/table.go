package materials

import (
	"errors"
	"fmt"
	"sort"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// degree of the interpolating spline: the least whose fourth derivative, which
// beta4 needs, is continuous.
const degree = 5

// minPoints is the fewest points that fix such a spline.
const minPoints = degree + 1

// Table is a medium given by measured indices. Between the points it is the
// interpolating spline of degree five with not-a-knot ends: it passes through
// every point, and the index and its first four derivatives are continuous, so
// that D, slope and beta4 have no jumps that the data do not have.
//
// Honest is not the same as quiet: the k-th derivative of data with an error e at
// spacing h carries an error of the order of e/h^k. For dispersion from noisy
// indices, fit a Sellmeier instead. A Table does not extrapolate. The zero Table
// gives an error. Make one with NewTable.
type Table struct {
	knots, coefficients []float64 // never written after NewTable
	source              Source
}

var errNoTable = errors.New("materials.Table: the table is empty; make one with NewTable")

// NewTable returns the medium through the given points: vacuum wavelengths (m),
// strictly rising, at least six, and the index at each. It copies both slices.
func NewTable(wavelengths, indices []float64, source Source) (Table, error) {
	const function = "materials.NewTable"
	n := len(wavelengths)
	if len(indices) != n {
		return Table{}, &domain.Error{Func: function, Argument: "len(indices)", Value: float64(len(indices)),
			Allowed: "the number of wavelengths"}
	}
	if n < minPoints {
		return Table{}, &domain.Error{Func: function, Argument: "len(wavelengths)", Value: float64(n),
			Allowed: "at least 6"}
	}
	for i, x := range wavelengths {
		at := func(name string) string { return fmt.Sprintf("%s[%d]", name, i) }
		if domain.Positive(function, "wavelengths", x, "m") != nil {
			return Table{}, domain.Positive(function, at("wavelengths"), x, "m")
		}
		if i > 0 && x <= wavelengths[i-1] {
			return Table{}, &domain.Error{Func: function, Argument: at("wavelengths"), Value: x,
				Allowed: "above the one before (m)"}
		}
		if domain.Positive(function, "indices", indices[i], "") != nil {
			return Table{}, domain.Positive(function, at("indices"), indices[i], "")
		}
	}
	t := Table{knots: notAKnot(wavelengths), source: source}
	t.coefficients = interpolate(t.knots, wavelengths, indices)
	for _, c := range t.coefficients {
		if err := domain.Result(function, "spline coefficient", c); err != nil {
			return Table{}, err
		}
	}
	return t, nil
}

// Range returns the vacuum wavelengths (m) of the first and the last point.
func (t Table) Range() Range {
	if len(t.knots) == 0 {
		return Range{}
	}
	return Range{t.knots[0], t.knots[len(t.knots)-1]}
}

// Source returns what NewTable was told of where the points come from.
func (t Table) Source() Source { return t.source }

// Taylor returns the series of the index about a vacuum wavelength (m). It fails
// outside the table; the error matches ErrRange.
func (t Table) Taylor(wavelength float64) (taylor.Series, error) {
	if len(t.knots) == 0 {
		return taylor.Series{}, errNoTable
	}
	if err := t.Range().checkWavelength("materials.Table", wavelength); err != nil {
		return taylor.Series{}, err
	}
	n := t.spline(wavelength)
	return n, checkSeries(n, wavelength)
}

// notAKnot returns the knots of the spline: the data's abscissas without the two
// next to each end, and each end degree+1 times (C. de Boor, A Practical
// Guide to Splines, rev. ed. 2001, chapter XIII).
func notAKnot(x []float64) []float64 {
	n := len(x)
	knots := make([]float64, 0, n+degree+1)
	for range degree + 1 {
		knots = append(knots, x[0])
	}
	const skip = (degree + 1) / 2
	for i := skip; i < n-skip; i++ {
		knots = append(knots, x[i])
	}
	for range degree + 1 {
		knots = append(knots, x[n-1])
	}
	return knots
}

// span returns j with knots[j] <= x < knots[j+1], or the last piece for x at the
// upper end.
func span(knots []float64, x float64) int {
	last := len(knots) - degree - 2
	j := sort.SearchFloat64s(knots[degree+1:last+1], x) + degree
	if j < last && knots[j+1] == x {
		j++
	}
	return j
}

// basis returns the degree+1 B-splines that do not vanish on piece j, at x (de
// Boor 2001, chapter X, equation 9).
func basis(knots []float64, j int, x float64) (b [degree + 1]float64) {
	b[0] = 1
	for k := 1; k <= degree; k++ {
		carry := 0.0
		for i := 0; i < k; i++ {
			right, left := knots[j+1+i], knots[j+1+i-k]
			part := b[i] / (right - left)
			b[i] = carry + (right-x)*part
			carry = (x - left) * part
		}
		b[k] = carry
	}
	return b
}

// interpolate solves for the coefficients by banded elimination. No pivoting is
// needed: the matrix is totally positive (de Boor 2001, chapter XIII).
func interpolate(knots, x, y []float64) []float64 {
	n := len(x)
	const width = 2*degree + 1
	a := make([][width]float64, n) // a[i][degree+k-i] is the entry of row i, column k
	c := append([]float64(nil), y...)
	for i := range x {
		j := span(knots, x[i])
		b := basis(knots, j, x[i])
		for m := range b {
			if k := j - degree + m - i + degree; k >= 0 && k < width {
				a[i][k] = b[m]
			}
		}
	}
	for i := range a {
		for r := i + 1; r <= i+degree && r < n; r++ {
			f := a[r][degree+i-r] / a[i][degree]
			if f == 0 {
				continue
			}
			for k := i; k <= i+degree; k++ {
				if m := degree + k - r; m < width {
					a[r][m] -= f * a[i][degree+k-i]
				}
			}
			c[r] -= f * c[i]
		}
	}
	for i := n - 1; i >= 0; i-- {
		for k := i + 1; k <= i+degree && k < n; k++ {
			c[i] -= a[i][degree+k-i] * c[k]
		}
		c[i] /= a[i][degree]
	}
	return c
}

// spline returns the series about x: the derivatives' own B-spline coefficients
// are divided differences of the coefficients (de Boor 2001, chapter X, equation
// 15), evaluated by his algorithm.
func (t *Table) spline(x float64) taylor.Series {
	j := span(t.knots, x)
	var d [degree + 1]float64
	copy(d[:], t.coefficients[j-degree:j+1])
	var s taylor.Series
	over := 1.0 // k!
	for k := range s {
		if k > 0 {
			over *= float64(k)
			for i := degree; i >= k; i-- {
				m := j - degree + i
				d[i] = float64(degree-k+1) * (d[i] - d[i-1]) / (t.knots[m+degree-k+1] - t.knots[m])
			}
		}
		e := d
		for r := 1; r <= degree-k; r++ {
			for i := degree; i >= k+r; i-- {
				m := j - degree + i
				low, high := t.knots[m], t.knots[m+degree-k-r+1]
				w := (x - low) / (high - low)
				e[i] = (1-w)*e[i-1] + w*e[i]
			}
		}
		s[k] = e[degree] / over
	}
	return s
}
