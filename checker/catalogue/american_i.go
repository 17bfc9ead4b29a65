package catalogue

// bearingPileLines holds the HP shapes, in the columns of wideFlangeLines.
//
// Source: as wideFlangeLines. The root radii of HP8 to HP14 are those with which
// the outline gives the published area and moments to the last digit (k_des of the
// database is larger there).
const bearingPileLines = `
HP18X204 18.3 18.1 1.13 1.13 1.18
HP18X181 18 18 1 1 1.18
HP18X157 17.7 17.9 0.87 0.87 1.18
HP18X135 17.5 17.8 0.75 0.75 1.18
HP16X183 16.5 16.3 1.13 1.13 1.18
HP16X162 16.3 16.1 1 1 1.18
HP16X141 16 16 0.875 0.875 1.185
HP16X121 15.8 15.9 0.75 0.75 1.18
HP16X101 15.5 15.8 0.625 0.625 1.185
HP16X88 15.3 15.7 0.54 0.54 1.18
HP14X117 14.21 14.885 0.805 0.805 0.6
HP14X102 14.01 14.785 0.705 0.705 0.6
HP14X89 13.83 14.695 0.615 0.615 0.6
HP14X73 13.61 14.585 0.505 0.505 0.6
HP12X89 12.4 12.3 0.72 0.72 0.6
HP12X84 12.28 12.295 0.685 0.685 0.6
HP12X74 12.13 12.215 0.605 0.61 0.6
HP12X63 11.94 12.125 0.515 0.515 0.6
HP12X53 11.78 12.045 0.435 0.435 0.6
HP10X57 9.99 10.225 0.565 0.565 0.5
HP10X42 9.7 10.075 0.415 0.42 0.5
HP8X36 8.02 8.155 0.445 0.445 0.4
`

// miscellaneousBeamLines holds the M shapes, in the columns of wideFlangeLines.
//
// Source: AISC's public shapes database; the root radii, of which k_des of the
// database tells nothing here, are those with which the outline gives the published
// area, moments and torsion constant. M3X2.9, M4X4.08 and M6X3.7 are by their
// published areas heavier than their names say.
const miscellaneousBeamLines = `
M12.5X12.4 12.5 3.75 0.155 0.228 0.25
M12.5X11.6 12.5 3.5 0.155 0.211 0.25
M12X11.8 12 3.07 0.177 0.225 0.225
M12X10.8 12 3.07 0.16 0.21 0.225
M12X10 12 3.25 0.149 0.18 0.225
M10X9 10 2.69 0.157 0.206 0.2
M10X8 9.95 2.69 0.141 0.182 0.2
M10X7.5 9.99 2.69 0.13 0.173 0.2
M8X6.5 8 2.28 0.135 0.189 0.175
M8X6.2 8 2.28 0.129 0.177 0.175
M6X4.4 6 1.84 0.114 0.171 0.15
M6X3.7 5.92 2 0.098 0.129 0.15
M5X18.9 5 5 0.316 0.416 0.3
M4X6 3.8 3.8 0.13 0.16 0.3
M4X4.08 4 2.25 0.115 0.17 0.31
M3X2.9 3 2.25 0.09 0.13 0.31
`

// standardBeamLines holds the S shapes: the designation, depth, flange width, web,
// mean flange thickness, root and toe radius in inches. The flanges slope 1 : 6.
//
// Source: the dimensions as for wideFlangeLines; the radii are those, one pair for
// each depth and flange, with which the outline gives the published properties.
const standardBeamLines = `
S24X121 24.5 8.05 0.8 1.09 0.6375 0.3125
S24X106 24.5 7.87 0.62 1.09 0.6375 0.3125
S24X100 24 7.245 0.745 0.87 0.65 0.3375
S24X90 24 7.125 0.625 0.87 0.65 0.3375
S24X80 24 7 0.5 0.87 0.65 0.3375
S20X96 20.3 7.2 0.8 0.92 0.65 0.3375
S20X86 20.3 7.06 0.66 0.92 0.65 0.3375
S20X75 20 6.385 0.635 0.795 0.65 0.35
S20X66 20 6.255 0.505 0.795 0.65 0.35
S18X70 18 6.251 0.711 0.691 0.525 0.3125
S18X54.7 18 6.001 0.461 0.691 0.525 0.3125
S15X50 15 5.64 0.55 0.622 0.5375 0.275
S15X42.9 15 5.501 0.411 0.622 0.5375 0.275
S12X50 12 5.477 0.687 0.659 0.5 0.3
S12X40.8 12 5.252 0.462 0.659 0.5 0.3
S12X35 12 5.078 0.428 0.544 0.4 0.2125
S12X31.8 12 5 0.35 0.544 0.4 0.2125
S10X35 10 4.944 0.594 0.491 0.45 0.225
S10X25.4 10 4.661 0.311 0.491 0.45 0.225
S8X23 8 4.171 0.441 0.425 0.4 0.2
S8X18.4 8 4.001 0.271 0.425 0.4 0.2
S6X17.25 6 3.565 0.465 0.359 0.3375 0.175
S6X12.5 6 3.332 0.232 0.359 0.3375 0.175
S5X10 5 3.004 0.214 0.326 0.3375 0.175
S4X9.5 4 2.796 0.326 0.293 0.3125 0.1625
S4X7.7 4 2.663 0.193 0.293 0.3125 0.1625
S3X7.5 3 2.509 0.349 0.26 0.275 0.1375
S3X5.7 3 2.33 0.17 0.26 0.275 0.1375
`
