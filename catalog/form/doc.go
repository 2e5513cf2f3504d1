// Package form reads and writes the YAML files of the program: it walks
// nodes, converts values, and gathers every problem with its file, line and
// column and a mend, instead of stopping at the first. It is the only package
// that imports a YAML library.
//
// # What is read
//
// One document of mappings, lists and scalars. Scalars are taken as written:
// a part number 4E7 stays one, and no text turns into a number, a date or a
// truth value by its looks. Anchors, aliases, tags and several documents are
// refused: they hide what a file says, and the first two can hide how much.
//
// # Limits
//
// A file may have MaxBytes bytes, MaxNodes values and MaxDepth levels. They
// bound memory: the library holds some 200 bytes for each value. A document
// is refused on a count of its separators, before it is parsed.
package form
