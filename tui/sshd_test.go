//go:build linux

package tui

import (
	"bytes"
	"fmt"
	"net"
	"os"
	"os/exec"
	"os/user"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// sshd is a server of ours on the loopback, with keys of its own in a folder of
// the test: nothing of the machine's is read or changed.
type sshd struct {
	port      string
	key, name string
	log       *bytes.Buffer
}

// startSSHD starts the server, or skips the test with a loud line where there is
// none.
func startSSHD(t *testing.T) *sshd {
	t.Helper()
	missing := func(what string) {
		fmt.Fprintf(os.Stderr, "!!! %s: THE SCREEN WAS NOT DRIVEN THROUGH SSHD (%s) !!!\n", what, t.Name())
		t.Skip(what)
	}
	server, err := exec.LookPath("sshd")
	if err != nil {
		server = "/usr/sbin/sshd"
	}
	for _, path := range []string{server, "ssh", "ssh-keygen"} {
		if _, err := exec.LookPath(path); err != nil {
			missing("NO " + filepath.Base(path))
		}
	}
	if os.Getuid() == 0 {
		if _, err := os.Stat("/run/sshd"); err != nil {
			missing("NO /run/sshd, WHICH sshd WANTS WHEN IT IS RUN BY root")
		}
	}
	me, err := user.Current()
	if err != nil {
		missing("NO USER NAME")
	}
	dir := t.TempDir()
	for _, name := range []string{"host", "user"} {
		if out, err := exec.Command("ssh-keygen", "-q", "-t", "ed25519", "-N", "", "-f", filepath.Join(dir, name)).CombinedOutput(); err != nil {
			t.Fatalf("ssh-keygen: %v\n%s", err, out)
		}
	}
	free, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	s := &sshd{key: filepath.Join(dir, "user"), name: me.Username, log: &bytes.Buffer{}}
	_, s.port, _ = net.SplitHostPort(free.Addr().String())
	free.Close()
	config := filepath.Join(dir, "config")
	text := strings.Join([]string{
		"ListenAddress 127.0.0.1:" + s.port, "HostKey " + filepath.Join(dir, "host"), "PidFile none",
		"AuthorizedKeysFile " + s.key + ".pub", "StrictModes no", "PasswordAuthentication no", "PermitRootLogin yes", "UsePAM no", "PrintMotd no", ""}, "\n")
	if err := os.WriteFile(config, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command(server, "-D", "-e", "-f", config)
	cmd.Stderr = s.log
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		_ = cmd.Process.Kill()
		_ = cmd.Wait()
	})
	for limit := time.Now().Add(10 * time.Second); ; time.Sleep(5 * time.Millisecond) {
		if c, err := net.Dial("tcp", "127.0.0.1:"+s.port); err == nil {
			c.Close()
			break
		} else if time.Now().After(limit) {
			t.Fatalf("sshd does not listen: %s", s.log)
		}
	}
	return s
}

// command runs a command in a folder on the server, with an environment and a
// terminal.
func (s *sshd) command(dir string, env []string, words ...string) *exec.Cmd {
	remote := "cd '" + dir + "' && exec env"
	for _, word := range append(env, words...) {
		remote += " '" + strings.ReplaceAll(word, "'", `'\''`) + "'"
	}
	return exec.Command("ssh", "-tt", "-q", "-F", "/dev/null", "-i", s.key, "-p", s.port, "-o", "IdentitiesOnly=yes", "-o", "IdentityAgent=none",
		"-o", "StrictHostKeyChecking=no", "-o", "UserKnownHostsFile=/dev/null", "-l", s.name, "127.0.0.1", remote)
}
