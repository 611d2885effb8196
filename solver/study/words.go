package study

import (
	"slices"
	"strconv"
	"strings"
)

func has(list []string, s string) bool { return slices.Contains(list, s) }

// list writes ids for people: all of a few, else the first and how many more.
func list(ids []string) string {
	const most = 8
	if len(ids) <= most {
		return strings.Join(ids, ", ")
	}
	return strings.Join(ids[:most], ", ") + " and " + count(len(ids)-most, "other")
}

// List writes ids for people: all of a few, else the first and how many more.
func List(ids []string) string { return list(ids) }

func count(n int, what string) string {
	s := strconv.Itoa(n) + " " + what
	if n != 1 {
		s += "s"
	}
	return s
}
