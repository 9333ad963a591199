// Package tabular reads records from a table that was pasted or came in a file,
// and writes tables of records: CSV after RFC 4180.
package tabular
