// Package drawing makes pictures of columns and of their results. A picture is
// a Scene: paths and labels on a sheet measured in millimetres, in a few named
// styles, that a writer turns into SVG here or into PDF elsewhere. A picture
// needs no legend: what a line is stands on the line. What matters is told by
// place and by width of line as well as by colour, so that a grey print says
// the same.
package drawing
