package draft

import "os"

// lock makes a file and keeps it open: an open file cannot be removed here.
func lock(path string) (release func(), err error) {
	f, err := os.OpenFile(path, os.O_CREATE|os.O_RDWR, 0o600)
	if err != nil {
		return nil, err
	}
	return func() { f.Close(); os.Remove(path) }, nil
}

// alive reports whether a session keeps the file open. Removing it fails then;
// the file of a session that has ended is of no use and goes.
func alive(path string) bool {
	if _, err := os.Stat(path); err != nil {
		return false
	}
	return os.Remove(path) != nil
}
