// Package domain holds the error that every glassthread package returns for an
// argument outside what a function allows, and the few checks that make it.
//
// The checks return an untyped nil when the value is allowed, so that a caller
// can chain them and return the first that fails. They allocate only when they
// fail.
package domain

import (
	"fmt"
	"math"
)

// Error says which argument of which function was refused, the value it had,
// and what is allowed. It matches errors.Is for its Kind, if it has one.
type Error struct {
	Func     string  // the function that refused, with its package: "numap.V"
	Argument string  // the argument's name: "radius"
	Value    float64 // the value it had, in SI units
	Allowed  string  // what is allowed, with its unit: "finite and above 0 (m)"
	Kind     error   // a sentinel that programs branch on; may be nil
}

// Error returns one line such as
// "numap.V: radius = -1: must be finite and above 0 (m)".
func (e *Error) Error() string {
	s := fmt.Sprintf("%s: %s = %v: must be %s", e.Func, e.Argument, e.Value, e.Allowed)
	if e.Kind != nil {
		s += " (" + e.Kind.Error() + ")"
	}
	return s
}

// Unwrap returns the Kind, so that errors.Is finds the sentinel.
func (e *Error) Unwrap() error { return e.Kind }

// Positive refuses a value that is not finite and above zero. The unit is text
// for the message: "m", "K", "" for a pure number.
func Positive(function, argument string, value float64, unit string) error {
	if value > 0 && value <= math.MaxFloat64 {
		return nil
	}
	return &Error{function, argument, value, "finite and above 0" + suffix(unit), nil}
}

// NonNegative refuses a value that is not finite and at least zero.
func NonNegative(function, argument string, value float64, unit string) error {
	if value >= 0 && value <= math.MaxFloat64 {
		return nil
	}
	return &Error{function, argument, value, "finite and at least 0" + suffix(unit), nil}
}

// Finite refuses NaN and the infinities.
func Finite(function, argument string, value float64, unit string) error {
	if math.Abs(value) <= math.MaxFloat64 {
		return nil
	}
	return &Error{function, argument, value, "finite" + suffix(unit), nil}
}

// Within refuses a value outside the closed interval from low to high.
func Within(function, argument string, value, low, high float64, unit string) error {
	if value >= low && value <= high {
		return nil
	}
	return &Error{function, argument, value, fmt.Sprintf("from %v to %v%s", low, high, suffix(unit)), nil}
}

// Result refuses a computed value that is not finite: the arguments, each
// allowed alone, went beyond the range of a float64 together. The value may be
// NaN or infinite; name says what was computed.
func Result(function, name string, value float64) error {
	if math.Abs(value) <= math.MaxFloat64 {
		return nil
	}
	return &Error{function, name + " (result)", value, "within the range of a float64; the arguments are too extreme together", nil}
}

func suffix(unit string) string {
	if unit == "" {
		return ""
	}
	return " (" + unit + ")"
}
