package root

import "math"

// All returns the zeros of f between a < b in rising order. f returns its value and
// its slope. The interval is cut into the given number of equal cells; a cell yields
// one zero where the sign changes, and two where it does not but the slopes show a
// turning point between, beyond which it does. So a pair of zeros is missed only if
// it shares a cell with a further turning point, or if one of them falls on a cell's end and
// the other within 1e-6 of the cell beyond it. Of a stretch where f is zero
// throughout only the ends of cells may be named. An error of f ends the search.
func All(f func(float64) (value, slope float64, err error), a, b float64, cells int) ([]float64, error) {
	value := func(x float64) (float64, error) { y, _, err := f(x); return y, err }
	slope := func(x float64) (float64, error) { _, d, err := f(x); return d, err }
	var zeros []float64
	add := func(from, to float64) error {
		x, err := Find(value, from, to, 0)
		if err == nil && (len(zeros) == 0 || x > zeros[len(zeros)-1]) {
			zeros = append(zeros, x)
		}
		return err
	}
	x0 := a
	y0, d0, err := f(x0)
	if err != nil {
		return nil, err
	}
	if y0 == 0 {
		zeros = append(zeros, x0)
	}
	for i := 1; i <= cells; i++ {
		share := float64(i) / float64(cells)
		x1 := (1-share)*a + share*b
		y1, d1, err := f(x1)
		if err != nil {
			return nil, err
		}
		if y0 == 0 {
			// The zero at x0 is known; look for another from just beside it.
			x0 += (x1 - x0) * 0x1p-20
			if y0, d0, err = f(x0); err != nil {
				return nil, err
			}
		}
		if math.IsNaN(y1) || math.IsNaN(y0) {
			return nil, ErrNotFinite
		}
		switch {
		case y0 == 0 && y1 == 0: // zero throughout: no single zero to name
		case y1 == 0 || (y0 > 0) != (y1 > 0):
			err = add(x0, x1)
		case y0 > 0 && d0 < 0 && d1 > 0, y0 < 0 && d0 > 0 && d1 < 0:
			var turn, y float64
			if turn, err = Find(slope, x0, x1, 0); err != nil {
				break
			}
			if y, err = value(turn); err == nil && (y == 0 || (y > 0) != (y0 > 0)) {
				if err = add(x0, turn); err == nil {
					err = add(turn, x1)
				}
			}
		}
		if err != nil {
			return nil, err
		}
		x0, y0, d0 = x1, y1, d1
	}
	return zeros, nil
}
