package section

import (
	"os"
	"os/exec"
	"path/filepath"
	"syscall"
	"testing"
)

func mountTiny(dir string) error {
	return syscall.Mount("tmpfs", dir, "tmpfs", 0, "size=64k")
}

func unmount(dir string) { _ = syscall.Unmount(dir, 0) }

// asNobody runs the test that calls it again as a user without rights.
func asNobody(t *testing.T) {
	dir, err := os.MkdirTemp("", "packrise-nobody")
	if err != nil {
		t.Fatal(err)
	}
	defer os.RemoveAll(dir)
	self, err := os.ReadFile("/proc/self/exe")
	if err != nil {
		t.Skip("the test can't be run again")
	}
	program := filepath.Join(dir, "test")
	if err := os.WriteFile(program, self, 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.Chmod(dir, 0o777); err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command(program, "-test.run=^"+t.Name()+"$", "-test.v")
	cmd.Dir = dir
	cmd.Env = append(os.Environ(), "TMPDIR="+dir)
	cmd.SysProcAttr = &syscall.SysProcAttr{Credential: &syscall.Credential{Uid: 65534, Gid: 65534}}
	if out, err := cmd.CombinedOutput(); err != nil {
		t.Errorf("as nobody: %v\n%s", err, out)
	}
}
