package catalogue

// upeRows holds the parallel flange channels UPE 80 to UPE 400.
//
// Source: EN 10365 (the dimensions of DIN 1026-2), read in two public copies of
// the DIN 1026-2 table that agree. Another published list of UPE areas (120:
// 16.0, 200: 30.4 cm2) does not follow from these dimensions and is not used.
var upeRows = []rolledRow{
	{80, 80, 50, 4, 7, 10, 0},
	{100, 100, 55, 4.5, 7.5, 10, 0},
	{120, 120, 60, 5, 8, 12, 0},
	{140, 140, 65, 5, 9, 12, 0},
	{160, 160, 70, 5.5, 9.5, 12, 0},
	{180, 180, 75, 5.5, 10.5, 12, 0},
	{200, 200, 80, 6, 11, 13, 0},
	{220, 220, 85, 6.5, 12, 13, 0},
	{240, 240, 90, 7, 12.5, 15, 0},
	{270, 270, 95, 7.5, 13.5, 15, 0},
	{300, 300, 100, 9.5, 15, 15, 0},
	{330, 330, 105, 11, 16, 18, 0},
	{360, 360, 110, 12, 17, 18, 0},
	{400, 400, 115, 13.5, 18, 18, 0},
}
