package taylor

// Add returns s + t.
func (s Series) Add(t Series) Series {
	for k := range s {
		s[k] += t[k]
	}
	return s
}

// Sub returns s - t.
func (s Series) Sub(t Series) Series {
	for k := range s {
		s[k] -= t[k]
	}
	return s
}

// Neg returns -s.
func (s Series) Neg() Series {
	for k := range s {
		s[k] = -s[k]
	}
	return s
}

// Scale returns the product of s and a number.
func (s Series) Scale(factor float64) Series {
	for k := range s {
		s[k] *= factor
	}
	return s
}

// Shift returns the sum of s and a number.
func (s Series) Shift(term float64) Series {
	s[0] += term
	return s
}

// Mul returns s t (Cauchy product).
func (s Series) Mul(t Series) Series {
	return Series{
		s[0] * t[0],
		s[0]*t[1] + s[1]*t[0],
		s[0]*t[2] + s[1]*t[1] + s[2]*t[0],
		s[0]*t[3] + s[1]*t[2] + s[2]*t[1] + s[3]*t[0],
		s[0]*t[4] + s[1]*t[3] + s[2]*t[2] + s[3]*t[1] + s[4]*t[0],
	}
}

// Square returns s^2.
func (s Series) Square() Series {
	return Series{
		s[0] * s[0],
		2 * s[0] * s[1],
		2*s[0]*s[2] + s[1]*s[1],
		2 * (s[0]*s[3] + s[1]*s[2]),
		2*(s[0]*s[4]+s[1]*s[3]) + s[2]*s[2],
	}
}

// Quo returns s / t. A t whose value is zero gives infinities or NaNs.
func (s Series) Quo(t Series) Series {
	var q Series
	q[0] = s[0] / t[0]
	q[1] = (s[1] - q[0]*t[1]) / t[0]
	q[2] = (s[2] - q[0]*t[2] - q[1]*t[1]) / t[0]
	q[3] = (s[3] - q[0]*t[3] - q[1]*t[2] - q[2]*t[1]) / t[0]
	q[4] = (s[4] - q[0]*t[4] - q[1]*t[3] - q[2]*t[2] - q[3]*t[1]) / t[0]
	return q
}

// Inv returns 1 / s.
func (s Series) Inv() Series { return Constant(1).Quo(s) }
