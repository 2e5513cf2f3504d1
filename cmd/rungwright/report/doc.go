// Package report shows a design to people: one HTML file that fetches
// nothing, the drawn schematic, and plots as SVG and PNG files.
//
// Everything is drawn once, on a gonum vector canvas, in inks that are named by
// what they are for. In a file an ink is a colour; in the page it is a class,
// so that light, dark and print each choose their own. Meaning never hangs on
// a colour alone: a word, a mark or a number stands beside it.
//
// A section without data is left out. The same design gives the same bytes.
package report
