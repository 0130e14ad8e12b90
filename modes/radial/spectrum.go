package radial

import "math"

// inner is the number of nodes inside an element.
const inner = degree - 1

type square [inner][inner]float64
type row [inner]float64

// diagonalise finds the eigenvalues of a symmetric matrix and applies the orthogonal
// transformation that diagonalises it to the given rows: a row x becomes x U. It is
// Householder's reduction to tridiagonal form and the implicit QL method (Golub and Van
// Loan, Matrix Computations, 4th ed., 8.3), where only what is asked for is rotated, as
// in Golub and Welsch's way to quadrature rules. Only the lower triangle
// is read; the matrix is overwritten.
func diagonalise(a *square, rows []row) (d row) {
	var e row // e[i] couples i and i+1
	for k := 0; k < inner-2; k++ {
		norm2 := 0.0
		for i := k + 2; i < inner; i++ {
			norm2 += a[i][k] * a[i][k]
		}
		if norm2 == 0 {
			continue
		}
		x := a[k+1][k]
		alpha := -math.Copysign(math.Sqrt(x*x+norm2), x)
		var v, p row
		v[k+1] = x - alpha
		for i := k + 2; i < inner; i++ {
			v[i] = a[i][k]
		}
		beta := 2 / (v[k+1]*v[k+1] + norm2)
		// A <- A - v q' - q v', q = p - (beta/2)(p'v) v, p = beta A v.
		for i := k + 1; i < inner; i++ {
			sum, x := 0.0, v[i]
			r := &a[i]
			for j := k + 1; j < i; j++ {
				sum += r[j] * v[j]
				p[j] += r[j] * x
			}
			p[i] += sum + r[i]*x
		}
		dot := 0.0
		for i := k + 1; i < inner; i++ {
			p[i] *= beta
			dot += p[i] * v[i]
		}
		for i := k + 1; i < inner; i++ {
			p[i] -= beta / 2 * dot * v[i]
			r := &a[i]
			for j := k + 1; j <= i; j++ {
				r[j] -= v[i]*p[j] + p[i]*v[j]
			}
		}
		a[k+1][k] = alpha
		for r := range rows {
			sum := 0.0
			for i := k + 1; i < inner; i++ {
				sum += rows[r][i] * v[i]
			}
			for i := k + 1; i < inner; i++ {
				rows[r][i] -= beta * sum * v[i]
			}
		}
	}
	for i := range inner {
		d[i] = a[i][i]
		if i+1 < inner {
			e[i] = a[i+1][i]
		}
	}
	for l := 0; l < inner; l++ {
		for range 60 {
			m := l
			for m < inner-1 && math.Abs(e[m]) > 0x1p-53*(math.Abs(d[m])+math.Abs(d[m+1])) {
				m++
			}
			if m == l {
				break
			}
			// Wilkinson's shift.
			g := (d[l+1] - d[l]) / (2 * e[l])
			g = d[m] - d[l] + e[l]/(g+math.Copysign(math.Sqrt(g*g+1), g))
			s, c, p := 1.0, 1.0, 0.0
			i := m - 1
			for ; i >= l; i-- {
				f, b := s*e[i], c*e[i]
				r := math.Sqrt(f*f + g*g)
				e[i+1] = r
				if r == 0 {
					d[i+1] -= p
					e[m] = 0
					break
				}
				s, c = f/r, g/r
				g = d[i+1] - p
				r = (d[i]-g)*s + 2*c*b
				p = s * r
				d[i+1] = g + p
				g = c*r - b
				for k := range rows {
					x := &rows[k]
					x[i+1], x[i] = s*x[i]+c*x[i+1], c*x[i]-s*x[i+1]
				}
			}
			if i >= l {
				continue
			}
			d[l] -= p
			e[l] = g
			e[m] = 0
		}
	}
	return d
}
