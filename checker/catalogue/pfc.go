package catalogue

// pfcLines holds the parallel flange channels PFC: depth, width and mass make
// the designation; then depth, width, web, flange and root radius in mm.
//
// Source: EN 10365 (before it BS 4-1), from memory.
const pfcLines = `
100x50x10 100 50 5 8.5 9
125x65x15 125 65 5.5 9.5 12
150x75x18 150 75 5.5 10 12
150x90x24 150 90 6.5 12 12
180x75x20 180 75 6 10.5 12
180x90x26 180 90 6.5 12.5 12
200x75x23 200 75 6 12.5 12
200x90x30 200 90 7 14 12
230x75x26 230 75 6.5 12.5 12
230x90x32 230 90 7.5 14 12
260x75x28 260 75 7 12 12
260x90x35 260 90 8 14 12
300x90x41 300 90 9 15.5 12
300x100x46 300 100 9 16.5 15
380x100x54 380 100 9.5 17.5 15
430x100x64 430 100 11 19 15
`
