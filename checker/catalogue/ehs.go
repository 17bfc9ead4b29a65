package catalogue

// hotElliptical lists the elliptical hollow sections of EN 10210-2: longer x
// shorter axis, then thicknesses, in millimetres.
//
// Source: EN 10210-2 Annex B; 300x150, 400x200x8 and 500x250x16 were read, the
// rest is from memory and may not be the whole list.
const hotElliptical = `
150x75: 4 5 6.3
200x100: 5 6.3 8 10
250x125: 6.3 8 10 12.5
300x150: 8 10 12.5 16
400x200: 8 10 12.5 16
500x250: 10 12.5 16
`
