// Command packrise-cli is the engine for scripts: the same answers as the window, no display, no C compiler. It reads and writes
// files and prints; it must hold no logic of its own.
package main
