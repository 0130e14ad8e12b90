package modes_test

import (
	"fmt"
	"log"
	"os"
	"strings"

	"glassthread/modes"
)

func ExampleReadProfile() {
	profile, err := modes.ReadProfile(strings.NewReader(`{
		"name": "Tarnwater shore line (an invented fibre)",
		"layers": [
			{"outer_radius_um": 25, "glass": "germania-silica", "fraction": 0.09, "exponent": 2, "outer_fraction": 0}
		],
		"cladding": {"glass": "silica", "fraction": 0}
	}`))
	if err != nil {
		log.Fatal(err)
	}
	fibre, err := profile.Fibre()
	if err != nil {
		log.Fatal(err)
	}
	list, err := fibre.Guided(1.31e-6)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Println(profile.Name)
	fmt.Printf("%d guided LP modes, the first %v\n", len(list), list[0].Mode)
	// Output:
	// Tarnwater shore line (an invented fibre)
	// 38 guided LP modes, the first LP01
}

func ExampleProfile_Write() {
	profile := modes.Profile{
		Layers:   []modes.ProfileLayer{{Outer: 4.1e-6, ProfileGlass: modes.ProfileGlass{Glass: "germania-silica", Fraction: 0.04}}},
		Cladding: modes.ProfileGlass{Glass: "silica"},
	}
	if err := profile.Write(os.Stdout); err != nil {
		log.Fatal(err)
	}
	// Output:
	// {
	//   "layers": [
	//     {
	//       "outer_radius_um": 4.1,
	//       "glass": "germania-silica",
	//       "fraction": 0.04
	//     }
	//   ],
	//   "cladding": {
	//     "glass": "silica",
	//     "fraction": 0
	//   }
	// }
}
