// Package sheet reads the tables that people have: workbooks (xlsx), text
// tables (csv, tsv) and YAML. Open gives any of them as sheets of text cells;
// ReadBOM finds the header and turns the rows into those of a bill of
// materials. It knows nothing of circuits or catalogs.
//
// # Doubts
//
// Nothing is guessed silently. Whatever was taken in one of several ways is a
// Doubt with its file, sheet and cell, the text seen and what to do. Of the
// grade Note it says what was done, of the grade Warning what is most likely a
// slip; what is Wrong must be settled, in the sheet or by Options, and
// comes back as an error.
//
// # What is refused
//
// A workbook passes a strict gate before the library that reads it sees a
// byte, for that library reads a damaged sheet as a shorter one and a hostile
// one without bounds. The gate's limits are the constants in gate.go. Old .xls
// files, password-protected and .ods files, and whatever is not a table, are
// told by their first bytes and refused in plain words.
package sheet
