package mechanics

import (
	"bytes"
	"fmt"
	"math"
	"strconv"
	"strings"

	"strikebook/convert/device"
	"strikebook/convert/metal"
)

// tablePoints is how many points the table of a device and a group has: enough
// for the curve through them to stay within 0.02 HL of the model.
const tablePoints = 33

// Tables solves the model for every device and group, as the CSV file that
// package rebound reads: a row each, with the hardness in HV at points that
// stand evenly in its logarithm, and the reading in HL at each.
func Tables() ([]byte, error) {
	var b bytes.Buffer
	b.WriteString("# The rebound model of package mechanics, solved at points spread evenly over the logarithm of HV; made by go generate ./convert/rebound, not by hand.\n")
	b.WriteString("device,group,hv,hl\n")
	for _, d := range device.All() {
		if !d.BuiltInCurve {
			continue
		}
		for _, g := range metal.All() {
			hvs, hls, err := solve(BodyOf(d), g)
			if err != nil {
				return nil, fmt.Errorf("device %s on %s: %w", d.Key, g.Key, err)
			}
			fmt.Fprintf(&b, "%s,%s,%s,%s\n", d.Key, g.Key, join(hvs, -1), join(hls, 2))
		}
	}
	return b.Bytes(), nil
}

func solve(b Body, g metal.Group) (hvs, hls []float64, err error) {
	for i := range tablePoints {
		hv := g.Lo * math.Pow(g.Hi/g.Lo, float64(i)/(tablePoints-1))
		hv = math.Round(hv*100) / 100 // short to write, and the model is solved at just this
		impact, err := Strike(b, g, hv)
		if err != nil {
			return nil, nil, err
		}
		hvs, hls = append(hvs, hv), append(hls, impact.HL)
	}
	return hvs, hls, nil
}

// join writes numbers with so many decimals (-1: as many as they need), separated by spaces.
func join(values []float64, decimals int) string {
	texts := make([]string, len(values))
	for i, v := range values {
		texts[i] = strconv.FormatFloat(v, 'f', decimals, 64)
	}
	return strings.Join(texts, " ")
}
