// Package unit is imported by package shop.
package unit

// Money is in cents.
type Money int

// Weight in kilograms, by part.
type Weight []float64
