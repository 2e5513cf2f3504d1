// Command rungwright chooses, proves and documents the parts of
// diode-capacitor voltage multiplier supplies. Each command is one file here;
// none of them does physics.
package main

import "os"

func main() { os.Exit(run(os.Args[1:], systemStreams())) }
