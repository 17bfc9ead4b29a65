package catalogue

// upnSmallest is the first UPN that this catalogue takes to be listed by
// EN 10365 (from memory); the smaller ones are those of DIN 1026-1.
const upnSmallest = 80

// upnRows holds the taper flange channels UPN 50 to UPN 400.
//
// Source: DIN 1026-1 table of taper flange channels, read in two public copies
// that agree but for print rounding of the toe radius (320: 8.75 mm). The slope of the flanges is that of
// section.StandardTaper.
var upnRows = []rolledRow{
	{50, 50, 38, 5, 7, 7, 3.5},
	{65, 65, 42, 5.5, 7.5, 7.5, 4},
	{80, 80, 45, 6, 8, 8, 4},
	{100, 100, 50, 6, 8.5, 8.5, 4.5},
	{120, 120, 55, 7, 9, 9, 4.5},
	{140, 140, 60, 7, 10, 10, 5},
	{160, 160, 65, 7.5, 10.5, 10.5, 5.5},
	{180, 180, 70, 8, 11, 11, 5.5},
	{200, 200, 75, 8.5, 11.5, 11.5, 6},
	{220, 220, 80, 9, 12.5, 12.5, 6.5},
	{240, 240, 85, 9.5, 13, 13, 6.5},
	{260, 260, 90, 10, 14, 14, 7},
	{280, 280, 95, 10, 15, 15, 7.5},
	{300, 300, 100, 10, 16, 16, 8},
	{320, 320, 100, 14, 17.5, 17.5, 8.75},
	{350, 350, 100, 14, 16, 16, 8},
	{380, 380, 102, 13.5, 16, 16, 8},
	{400, 400, 110, 14, 18, 18, 9},
}
