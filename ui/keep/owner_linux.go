package keep

import (
	"os"
	"strconv"
	"strings"
)

// begun reads the start time of a process in ticks since the machine started, field 22 of /proc/PID/stat (proc(5)); "" if there is none.
func begun(pid int) string {
	data, err := os.ReadFile("/proc/" + strconv.Itoa(pid) + "/stat")
	if err != nil {
		return ""
	}
	text := string(data)
	fields := strings.Fields(text[strings.LastIndexByte(text, ')')+1:]) // the name in parentheses may hold anything
	if len(fields) < 20 || fields[0] == "Z" {
		return "" // killed and only waited for
	}
	return fields[19]
}

// alive tells whether there is such a process.
func alive(pid int) bool { return begun(pid) != "" }
