// Command pack zips the folder of a VS Code extension to a .vsix: the files below
// extension/, a manifest made from its package.json, and the list of content
// types that the format (Open Packaging Conventions) asks for.
package main

import (
	"archive/zip"
	"encoding/json"
	"encoding/xml"
	"errors"
	"flag"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"sort"
	"strings"
	"time"
)

func main() {
	target := flag.String("target", "", "the platform, as linux-x64")
	from := flag.String("from", "", "the folder of the extension")
	to := flag.String("to", ".", "the folder for the .vsix")
	flag.Parse()
	file, err := pack(*target, *from, *to)
	if err != nil {
		fmt.Fprintln(os.Stderr, "pack:", err)
		os.Exit(1)
	}
	fmt.Println(file)
}

// extension is what the manifest needs of package.json.
type extension struct {
	Name, DisplayName, Description, Version, Publisher string
	Categories, Keywords                               []string
	Engines                                            struct{ VSCode string }
}

// epoch is the time of every file, the first that the format knows: the same
// files give the same bytes.
var epoch = time.Date(1980, 1, 1, 0, 0, 0, 0, time.UTC)

// pack writes the package and gives its name.
func pack(target, from, to string) (name string, err error) {
	raw, err := os.ReadFile(filepath.Join(from, "package.json"))
	if err != nil {
		return "", err
	}
	var e extension
	if err := json.Unmarshal(raw, &e); err != nil {
		return "", fmt.Errorf("package.json: %w", err)
	}
	if target == "" || e.Name == "" || e.Version == "" || e.Publisher == "" || e.Engines.VSCode == "" {
		return "", errors.New("the target, or the name, version, publisher or engine in package.json, is missing")
	}
	var files []string
	err = filepath.WalkDir(from, func(p string, d fs.DirEntry, err error) error {
		if err == nil && d.Type().IsRegular() {
			files = append(files, p)
		}
		return err
	})
	if err != nil {
		return "", err
	}
	sort.Strings(files)

	name = filepath.Join(to, fmt.Sprintf("%s-%s-%s.vsix", e.Name, e.Version, target))
	out, err := os.Create(name)
	if err != nil {
		return "", err
	}
	defer func() { err = errors.Join(err, out.Close()) }()
	z := zip.NewWriter(out)
	entry := func(name string, mode fs.FileMode, content io.Reader) error {
		h := &zip.FileHeader{Name: name, Method: zip.Deflate, Modified: epoch}
		h.SetMode(mode)
		w, err := z.CreateHeader(h)
		if err != nil {
			return err
		}
		_, err = io.Copy(w, content)
		return err
	}
	if err := entry("extension.vsixmanifest", 0o644, strings.NewReader(manifest(e, target))); err != nil {
		return "", err
	}
	if err := entry("[Content_Types].xml", 0o644, strings.NewReader(contentTypes(files))); err != nil {
		return "", err
	}
	for _, f := range files {
		below, err := filepath.Rel(from, f)
		if err != nil {
			return "", err
		}
		mode := fs.FileMode(0o644)
		if strings.HasPrefix(filepath.ToSlash(below), "bin/") {
			mode = 0o755 // the server; said here since Windows knows no such bit
		}
		content, err := os.Open(f)
		if err != nil {
			return "", err
		}
		err = errors.Join(entry(path.Join("extension", filepath.ToSlash(below)), mode, content), content.Close())
		if err != nil {
			return "", err
		}
	}
	return name, z.Close()
}

func text(s string) string {
	var b strings.Builder
	if err := xml.EscapeText(&b, []byte(s)); err != nil {
		panic(err) // a builder takes everything
	}
	return b.String()
}

// manifest is the description of the package.
func manifest(e extension, target string) string {
	return fmt.Sprintf(`<?xml version="1.0" encoding="utf-8"?>
<PackageManifest Version="2.0.0" xmlns="http://schemas.microsoft.com/developer/vsx-schema/2011">
  <Metadata>
    <Identity Language="en-US" Id="%s" Version="%s" Publisher="%s" TargetPlatform="%s"/>
    <DisplayName>%s</DisplayName>
    <Description xml:space="preserve">%s</Description>
    <Tags>%s</Tags>
    <Categories>%s</Categories>
    <License>extension/LICENSE.txt</License>
    <Properties>
      <Property Id="Microsoft.VisualStudio.Code.Engine" Value="%s"/>
      <Property Id="Microsoft.VisualStudio.Code.ExtensionDependencies" Value=""/>
      <Property Id="Microsoft.VisualStudio.Code.ExtensionPack" Value=""/>
      <Property Id="Microsoft.VisualStudio.Code.ExtensionKind" Value="workspace"/>
    </Properties>
  </Metadata>
  <Installation><InstallationTarget Id="Microsoft.VisualStudio.Code"/></Installation>
  <Dependencies/>
  <Assets>
    <Asset Type="Microsoft.VisualStudio.Code.Manifest" Path="extension/package.json" Addressable="true"/>
    <Asset Type="Microsoft.VisualStudio.Services.Content.Details" Path="extension/README.md" Addressable="true"/>
    <Asset Type="Microsoft.VisualStudio.Services.Content.License" Path="extension/LICENSE.txt" Addressable="true"/>
  </Assets>
</PackageManifest>
`, text(e.Name), text(e.Version), text(e.Publisher), text(target), text(e.DisplayName), text(e.Description),
		text(strings.Join(e.Keywords, ",")), text(strings.Join(e.Categories, ",")), text(e.Engines.VSCode))
}

// contentTypes lists the type of every ending that occurs; a file without one is
// named by itself.
func contentTypes(files []string) string {
	known := map[string]string{"json": "application/json", "js": "application/javascript", "md": "text/markdown", "txt": "text/plain",
		"vsixmanifest": "text/xml"}
	endings := map[string]bool{"vsixmanifest": true}
	var single []string
	for _, f := range files {
		if ending := strings.TrimPrefix(filepath.Ext(f), "."); ending != "" {
			endings[ending] = true
		} else {
			single = append(single, filepath.Base(filepath.Dir(f))+"/"+filepath.Base(f))
		}
	}
	var sorted []string
	for e := range endings {
		sorted = append(sorted, e)
	}
	sort.Strings(sorted)
	var b strings.Builder
	b.WriteString(`<?xml version="1.0" encoding="utf-8"?>` + "\n" + `<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">`)
	for _, e := range sorted {
		kind := known[e]
		if kind == "" {
			kind = "application/octet-stream"
		}
		fmt.Fprintf(&b, `<Default Extension=".%s" ContentType="%s"/>`, text(e), kind)
	}
	for _, s := range single {
		fmt.Fprintf(&b, `<Override PartName="/extension/%s" ContentType="application/octet-stream"/>`, text(s))
	}
	b.WriteString("</Types>\n")
	return b.String()
}
