package rig_test

import (
	"fmt"
	"math"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/rig"
)

// A worker 1.2 m to the side of an anchor 3 m above the surface, on 2 m of
// connector, with a lower roof 5 m below.
func Example() {
	layout := rig.Layout{
		Anchor: rig.Spot{Z: 3}, DRing: 1.5, Feet: 1.5, HalfWidth: 0.3,
		Length: 2, PositionCount: 1, ObstacleCount: 1,
	}
	layout.Positions[0].X = 1.2
	layout.Obstacles[0] = rig.NewLevel(-5)

	var survey rig.Survey
	layout.Survey(&survey)
	place := &survey.Places[survey.FreeFall.At]
	fmt.Printf("free fall %.3f m, offset %.2f degrees, drop %.3f m\n",
		place.FreeFall, place.OffsetAngle*180/math.Pi, place.SwingDrop)

	var clearance rig.Clearance
	clearance.Enter(rig.ItemFreeFall, place.FreeFall)
	clearance.Enter(rig.ItemSwingDrop, place.SwingDrop)
	clearance.Enter(rig.ItemDeceleration, 1.1, rig.ItemLineStretch, rig.ItemAnchor)
	clearance.Enter(rig.ItemHarness, 0.3)
	fmt.Println("without a margin:", clearance.Below(rig.BelowFeet).Needed)
	clearance.Enter(rig.ItemMargin, 1)
	sum := clearance.Below(rig.BelowFeet)
	fmt.Printf("needed %.2f m, left %.2f m\n", sum.Needed, layout.Left(place, sum.Needed).List[0].Left)

	var path connector.Path
	if err := path.Set(connector.Elastic(connector.Webbing, 60000), connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 1})); err != nil {
		fmt.Println(err)
		return
	}
	body := rig.Body{Mass: 100, Gravity: 9.80665}
	swing := layout.Swing(place, &body)
	fmt.Printf("inextensible: %.2f to %.2f m/s at the lowest point\n", swing.LowestLow, swing.LowestHigh)
	var tether rig.Tether
	if err := tether.Set(&path, place, &body); err != nil {
		fmt.Println(err)
		return
	}
	var planar rig.Planar
	if err := layout.Planar(place, &tether, &body, 1e-9, &planar); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("in time: %.2f m/s at the lowest point, as after a straight fall of %.2f m\n", planar.Lowest.Speed, planar.Lowest.Height)
	// Output:
	// free fall 0.100 m, offset 38.66 degrees, drop 0.400 m
	// without a margin: NaN
	// needed 2.90 m, left 2.10 m
	// inextensible: 2.92 to 3.13 m/s at the lowest point
	// in time: 2.77 m/s at the lowest point, as after a straight fall of 0.39 m
}
