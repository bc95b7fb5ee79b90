package main

import (
	"encoding/json"
	"fmt"
	"runtime"
	"runtime/debug"

	"github.com/spf13/cobra"

	"beckline/carbonate"
)

func versionCommand(c *console) *cobra.Command {
	var asJSON bool
	cmd := &cobra.Command{
		Use:     "version",
		Short:   "version of the program, of Go, and of the constants",
		Long:    "Says which program and which set of equilibrium constants gave an answer.",
		Example: "  beckline version",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			if asJSON {
				text, err := json.Marshal(map[string]string{"version": programVersion(), "go": runtime.Version(),
					"constants": carbonate.ConstantSet})
				fmt.Fprintf(c.out, "%s\n", text)
				return err
			}
			fmt.Fprintf(c.out, "beckline %s\n%s %s/%s\nconstants %s\n", programVersion(),
				runtime.Version(), runtime.GOOS, runtime.GOARCH, carbonate.ConstantSet)
			return nil
		},
	}
	addJSON(cmd, &asJSON)
	return cmd
}

// programVersion is what the build says of itself: the module's version, or
// the revision it was built from.
func programVersion() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return "of unknown version"
	}
	if v := info.Main.Version; v != "" && v != "(devel)" {
		return v
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" {
			return s.Value[:min(12, len(s.Value))]
		}
	}
	return "built from source"
}
