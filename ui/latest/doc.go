// Package latest runs the newest request beside its caller: a request made while another runs replaces any that waits. It
// must not know what it runs, nor Fyne.
package latest
