// Package edition names the data and methods that every result rests on.
package edition

// Current changes whenever a result could.
const Current = "2026.1"
