package main

import (
	"bytes"
	"fmt"
	"io"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strings"

	"kern/checker/sheet"
	"kern/lsp/disk"
)

// verifySheet says whether a finished sheet still follows from its files: whether
// the files are the same, and whether the sheet made of them again is.
func verifySheet(out io.Writer, file string, paths []string) error {
	data, err := os.ReadFile(file)
	if err != nil {
		return fmt.Errorf("%s: %w", file, reason(err))
	}
	mark, ok := sheet.ReadMark(data)
	if !ok {
		return fmt.Errorf("%s: this is no sheet of kern, or what it was made from was taken out of it (a sheet that a browser has printed says nothing: verify the HTML)", file)
	}
	if len(paths) > 1 {
		return fmt.Errorf("--verify takes one folder, where the files of the sheet are")
	}
	dir, err := folderOf(mark, file, paths)
	if err != nil {
		return err
	}
	fmt.Fprintf(out, "%s: %s, made by %s of %s\n", file, mark.Form, mark.Program, counted(len(mark.Inputs.Files), "file"))
	changed := 0
	for _, f := range mark.Inputs.Files {
		text, err := os.ReadFile(filepath.Join(dir, filepath.FromSlash(f.Name)))
		switch {
		case err != nil:
			changed++
			fmt.Fprintf(out, "  missing  %s: %v\n", f.Name, reason(err))
		case sheet.DigestOf(string(text)) != f.Digest:
			changed++
			fmt.Fprintf(out, "  changed  %s\n", f.Name)
		}
	}
	if changed > 0 {
		fmt.Fprintf(out, "It does not follow from the files any more: %s changed or missing. Make the sheet again.\n", counted(changed, "file"))
		return errWrong
	}
	again, err := remake(mark, dir)
	if err != nil {
		return fmt.Errorf("%s: the files are the same, but the sheet could not be made again: %w", file, err)
	}
	var fresh bytes.Buffer
	if err := again.Write(&fresh, mark.Form, nil); err != nil {
		return err
	}
	same := bytes.Equal(fresh.Bytes(), data)
	if mark.Form != "pdf" { // a checkout may have turned the line ends of a text
		same = bytes.Equal(fresh.Bytes(), bytes.ReplaceAll(data, []byte("\r\n"), []byte("\n")))
	}
	switch {
	case again.Inputs.Digest != mark.Inputs.Digest:
		fmt.Fprintln(out, "It does not follow from the files any more: what it includes is other files now. Make the sheet again.")
	case same:
		fmt.Fprintln(out, "It follows from the files: they are unchanged, and the sheet made again is the same to the byte.")
		return nil
	case again.Results != mark.Results:
		fmt.Fprintf(out, "It does not follow from the files: they are unchanged, but %s finds other results than %s. Compare the two sheets before you rely on either.\n", program(), mark.Program)
	case mark.Program != program():
		fmt.Fprintf(out, "The files are unchanged and %s finds the same verdicts and utilisations; it writes the sheet differently than %s did, so the rest was not compared.\n", program(), mark.Program)
		return nil
	default:
		fmt.Fprintln(out, "It does not follow from the files: they are unchanged, but the sheet made again differs. Somebody has edited the sheet, or it was made by another build of the program.")
	}
	return errWrong
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// folderOf finds the folder that the names of the sheet's files count from: the
// one that is said, else the working directory, the folder of the sheet, or the one
// in this checkout that holds them.
func folderOf(mark sheet.Mark, file string, paths []string) (string, error) {
	complete := func(dir string) bool {
		return !slices.ContainsFunc(mark.Inputs.Files, func(f sheet.Input) bool {
			_, err := os.Stat(filepath.Join(dir, filepath.FromSlash(f.Name)))
			return err != nil
		})
	}
	if len(paths) == 1 {
		info, err := os.Stat(paths[0])
		switch {
		case err != nil:
			return "", fmt.Errorf("%s: %w", paths[0], reason(err))
		case !info.IsDir():
			return "", fmt.Errorf("%s is no folder: name the folder that the files of the sheet count from", paths[0])
		}
		return paths[0], nil
	}
	for _, dir := range []string{".", filepath.Dir(file)} {
		if complete(dir) {
			return dir, nil
		}
	}
	here, err := os.Getwd()
	if err != nil {
		return "", err
	}
	folder, err := disk.Open(disk.Checkout(here))
	if err != nil {
		return "", err
	}
	defer folder.Close()
	found, err := folder.Find(folder.Dir)
	if err != nil {
		return "", err
	}
	// any file of the sheet tells the folder; a copy with the very texts wins
	best := ""
	for _, f := range mark.Inputs.Files {
		for _, name := range found {
			dir, ok := strings.CutSuffix("/"+name, "/"+f.Name)
			if !ok {
				continue
			}
			dir = folder.Path(path.Join(".", dir))
			if !complete(dir) {
				continue
			}
			if best == "" {
				best = dir
			}
			if text, err := os.ReadFile(filepath.Join(dir, filepath.FromSlash(f.Name))); err == nil && sheet.DigestOf(string(text)) == f.Digest {
				return dir, nil
			}
		}
	}
	if best == "" {
		var names []string
		for _, f := range mark.Inputs.Files {
			names = append(names, f.Name)
		}
		return "", fmt.Errorf("%s: its files (%s) are neither here nor beside it nor together anywhere in %s; name their folder: kern sheet --verify %s FOLDER", file, strings.Join(names, ", "), folder.Dir, file)
	}
	return best, nil
}

// remake composes the sheet of a mark again.
func remake(mark sheet.Mark, dir string) (*sheet.Sheet, error) {
	var paths []string
	for _, f := range mark.Inputs.Files {
		if f.Asked {
			paths = append(paths, filepath.Join(dir, filepath.FromSlash(f.Name)))
		}
	}
	if len(paths) == 0 {
		return nil, fmt.Errorf("it names no calculation that was asked for")
	}
	w, err := openWorkspace(paths)
	if err != nil {
		return nil, err
	}
	report := w.check(os.Stderr)
	return sheet.New(report, sheet.Options{Program: program(), Asked: w.names, Members: mark.Members, Full: mark.Full, Paper: mark.Paper})
}
