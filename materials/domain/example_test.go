package domain_test

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/domain"
)

// A function checks its arguments one after the other and its result at the end.
func Example() {
	area := func(radius float64) (float64, error) {
		const name = "demo.Area"
		if err := domain.Positive(name, "radius", radius, "m"); err != nil {
			return 0, err
		}
		a := math.Pi * radius * radius
		return a, domain.Result(name, "area", a)
	}
	fmt.Println(area(2))
	fmt.Println(area(-2))
	_, err := area(1e200)
	fmt.Println(err)
	// Output:
	// 12.566370614359172 <nil>
	// 0 demo.Area: radius = -2: must be finite and above 0 (m)
	// demo.Area: area (result) = +Inf: must be within the range of a float64; the arguments are too extreme together
}

// Programs branch on the sentinel, people read the message, and tools take the fields.
func ExampleError() {
	var ErrCold = errors.New("too cold")
	err := error(&domain.Error{Func: "demo.Melt", Argument: "temperature", Value: 300,
		Allowed: "above 1900 (K)", Kind: ErrCold})
	fmt.Println(err)
	var refused *domain.Error
	if errors.As(err, &refused) {
		fmt.Println(refused.Argument, refused.Value, errors.Is(err, ErrCold))
	}
	// Output:
	// demo.Melt: temperature = 300: must be above 1900 (K) (too cold)
	// temperature 300 true
}

func ExampleError_Error() {
	err := &domain.Error{Func: "demo.F", Argument: "x", Value: 3, Allowed: "below 2"}
	fmt.Println(err.Error())
	// Output: demo.F: x = 3: must be below 2
}

func ExampleError_Unwrap() {
	cause := errors.New("too cold")
	fmt.Println((&domain.Error{Kind: cause}).Unwrap() == cause)
	// Output: true
}

func ExamplePositive() {
	fmt.Println(domain.Positive("demo.F", "radius", 4e-6, "m"))
	fmt.Println(domain.Positive("demo.F", "radius", 0, "m"))
	// Output:
	// <nil>
	// demo.F: radius = 0: must be finite and above 0 (m)
}

func ExampleNonNegative() {
	fmt.Println(domain.NonNegative("demo.F", "offset", 0, "m"))
	fmt.Println(domain.NonNegative("demo.F", "offset", -1e-6, "m"))
	// Output:
	// <nil>
	// demo.F: offset = -1e-06: must be finite and at least 0 (m)
}

func ExampleFinite() {
	fmt.Println(domain.Finite("demo.F", "detuning", -1, "Hz"))
	fmt.Println(domain.Finite("demo.F", "detuning", math.NaN(), "Hz"))
	// Output:
	// <nil>
	// demo.F: detuning = NaN: must be finite (Hz)
}

func ExampleWithin() {
	fmt.Println(domain.Within("demo.F", "fraction", 0.25, 0, 1, ""))
	fmt.Println(domain.Within("demo.F", "fraction", 25, 0, 1, ""))
	// Output:
	// <nil>
	// demo.F: fraction = 25: must be from 0 to 1
}

func ExampleResult() {
	fmt.Println(domain.Result("demo.F", "gain", 12))
	fmt.Println(domain.Result("demo.F", "gain", math.Inf(1)))
	// Output:
	// <nil>
	// demo.F: gain (result) = +Inf: must be within the range of a float64; the arguments are too extreme together
}
