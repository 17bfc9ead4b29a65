package checker_test

// bendingBases are the settings that change how bending is checked.
var bendingBases = []string{
	"basis { standard \"EN 1993-1-1:2005\" }",
	"basis { standard \"EN 1993-1-1:2005\"; interaction annex A; net_ratio = 0.9 because \"holes\" }",
	"basis { standard \"EN 1993-1-1:2005\"; lateral buckling rolled; interaction annex A; gamma_M1 = 1.05 because \"national annex\"; show kip, kip-ft, in, ksi }",
	"basis { standard \"EN 1993-1-1:2005\" annex \"United Kingdom\" }",
	"basis { standard \"EN 1993-1-1:2005\"; lateral buckling rolled; C_1 = 1.13 because \"table\"; C_2 = 0.45 because \"table\"; z_g_h = 0.5 because \"load on the flange\"; k_c = 0.94 because \"table\" }",
}

// bendingMembers reach every formula of bending to EN 1993-1-1.
const bendingMembers = `
material steel = "S355"
material mild { E = 210 GPa; fy = 235 MPa; fu = 360 MPa; density = 7850 kg/m3 }
section ipe  = "IPE 300"
section heb  = "HEB 200"
section slim = isection { depth = 500 mm; width = 160 mm; web = 5 mm; flange = 10 mm; made = welded }
section wide = isection { depth = 300 mm; width = 400 mm; web = 10 mm; flange = 9 mm; made = welded }
section deep = isection { depth = 1000 mm; width = 300 mm; web = 6 mm; flange = 20 mm; made = welded }
section thinI = isection { depth = 900 mm; width = 400 mm; web = 5 mm; flange = 10 mm; made = welded }
section class3 = isection { depth = 300 mm; width = 300 mm; web = 10 mm; flange = 13 mm; made = welded }
section shs  = tube { width = 120 mm; wall = 8 mm; made = hot }
section rhs  = tube { depth = 200 mm; width = 100 mm; wall = 8 mm; made = hot }
section flatrhs = tube { depth = 400 mm; width = 80 mm; wall = 6 mm; made = hot }
section c3rhs = tube { depth = 200 mm; width = 150 mm; wall = 4.9 mm; made = hot }
section c4rhs = tube { depth = 300 mm; width = 200 mm; wall = 3 mm; made = cold }
section c4thin = tube { depth = 500 mm; width = 400 mm; wall = 3 mm; made = cold }
section c4box = tube { depth = 600 mm; width = 400 mm; wall = 5 mm; corner = 0 mm; made = welded }
section c4boxthin = tube { depth = 900 mm; width = 800 mm; wall = 5 mm; corner = 0 mm; made = welded }
section box2 = tube { depth = 600 mm; width = 250 mm; wall = 5 mm; corner = 0 mm; made = welded }
section box  = tube { depth = 200 mm; width = 140 mm; wall = 10 mm; corner = 0 mm; made = welded }
section chs  = pipe { outside = 168.3 mm; wall = 8 mm; made = hot }
section flat = bar { width = 40 mm; depth = 120 mm }
section sq   = bar { width = 80 mm }
section rnd  = rod { diameter = 80 mm }
section tee1 = tee { depth = 150 mm; width = 150 mm; web = 12 mm; flange = 14 mm; made = welded }
section lun  = angle { depth = 150 mm; width = 100 mm; wall = 14 mm; root = 12 mm }
section told = given { A = 50 cm2; I_major = 4000 cm4; I_minor = 1200 cm4; W_major = 350 cm3; W_minor = 120 cm3; Wpl_major = 400 cm3; Wpl_minor = 190 cm3; I_t = 20 cm4; I_w = 60000 cm6; thickness = 12 mm; class = 1; curve = c }

column I1 { section = ipe; material = steel; height = 4 m; load 150 kN; load 40 kNm about major at top; load 4 kNm about minor at top }
strut LEG { section = lun; material = mild; length = 2.4 m; load 60 kN; connected by long leg }
column I2 as I1 { load 150 kN; load 20 kNm about major at top; load 20 kNm about major at base }
column I3 as I1 { load 150 kN; load 10 kN/m about major }
column I4 as I1 { load 150 kN; load 30 kN across major at 2 m }
column I5 as I1 { load 150 kN; load 30 kN across major at 1 m }
column I6 as I1 { load 150 kN; load 10 kN/m about major; load 30 kNm about major at top }
column I7 as I1 { load 150 kN; load 10 kN/m about major; load 30 kNm about major at top; load 10 kNm about major at base; load 1 kN/m about minor; load 2 kNm about minor at top; load 2 kNm about minor at base }
column I8 as I1 { load 150 kN; load 20 kN across major at 2 m; load 10 kNm about major at top; load -5 kNm about major at base; load 3 kN across minor at 2 m; load 2 kNm about minor at top; load -1 kNm about minor at base }
column I9 as I1 { load 150 kN; load 20 kN across major at 2 m; load 10 kNm about major at top; load 5 kNm about major at base; load 3 kN across minor at 2 m; load 1 kNm about minor at top; load 0.5 kNm about minor at base }
column I10 as I1 { load 150 kN; load -20 kN across major at 2 m; load 15 kNm about major at top; load -12 kNm about major at base; load -3 kN across minor at 2 m; load 2.2 kNm about minor at top; load -1.9 kNm about minor at base }
column I11 as I1 { load 150 kN; load -12 kN across major at 2 m; load 35 kNm about major at top; load 3 kNm about major at base; load -2 kN across minor at 2 m; load 5 kNm about minor at top; load 0.5 kNm about minor at base }
column I12 as I1 { load 150 kN; load -4 kN/m about major; load 20 kNm about major at top; load -5 kNm about major at base; load -0.8 kN/m about minor; load 3 kNm about minor at top; load -1 kNm about minor at base }
column I13 as I1 { load 150 kN; load -4 kN/m about major; load 20 kNm about major at top; load 5 kNm about major at base; load -0.8 kN/m about minor; load 3 kNm about minor at top; load 0.5 kNm about minor at base }
column I14 as I1 { load 150 kN; load 3 kN/m about major; load 20 kNm about major at top; load 1 kN/m about minor; load 4 kNm about minor at top }
column I15 as I1 { load 2600 kN; load 10 kNm about major at top }
column I16 as I1 { load 2600 kN; load 2 kNm about minor at top }
column I17 as I1 { load 2600 kN; load 10 kNm about major at top; load 2 kNm about minor at top }
column I18 as I1 { load 500 kN; load 420 kN across major at 0.1 m }
column I19 as I1 { load 50 kN; load 900 kN across minor at 0.05 m }
column I20 as I1 { load 50 kN; load 420 kN across major at 0.1 m; load 900 kN across minor at 0.05 m }
column I21 as I1 { load 5 kNm about major at top; load 1 kNm about minor at top }
column I22 as I1 { hold minor at 2 m; hold twist at 2 m; load 150 kN; load 30 kN across major at 1 m; load 1 kNm about minor at top }
column I23 as I1 { base fixed; top guided; load 100 kN; load 10 kNm about major at top }
column I24 as I1 { base fixed; top free; load 60 kN; load 1 kNm about minor at top }
column I25 as I1 { hold minor at 1 m; hold minor at 2 m; hold minor at 3 m; height = 4 m; load 150 kN; load 8 kN/m about major; load 1 kN/m about minor }
column I26 as I1 { base fixed about minor; top fixed about minor; load 100 kN; load 5 kN/m about minor }
column I27 as I1 { hold both at 1.3 m; hold twist at 1.3 m; hold both at 2.6 m; hold twist at 2.6 m; load 400 kN at 1.3 m; load 100 kN; load 40 kNm about major at top; load 3 kNm about minor at top }
column I28 as I1 { section = heb; height = 1 m; load 500 kN; load 60 kNm about major at top; load 30 kNm about minor at top }
column I29 as I1 { load 40 kNm about major at top; load 3000 kN }
column I30 as I1 { section = heb; height = 9 m; load 20 kN; load 50 kNm about major at top; load 10 kNm about minor at top }
column I31 as I1 { section = heb; height = 3 m; load 1800 kN; load 10 kNm about minor at top }
column I32 as I1 { base fixed about major; top guided about major; load 100 kN; load 10 kNm about major at top; load 1 kNm about minor at top }
column I33 as I1 { hold major at 2 m; load 100 kN; load 10 kN/m about major from 0 m to 1 m; load 1 kNm about minor at top }
column I34 as I1 { load 150 kN; load 20 kN across major at 2 m; load 15 kNm about major at top; load -12 kNm about major at base; load 3 kN across minor at 2 m; load 2.2 kNm about minor at top; load -1.9 kNm about minor at base }
column I35 as I1 { load 150 kN; load 15 kN across major at 2 m; load 20 kNm about major at top; load 5 kNm about major at base; load 2 kN across minor at 2 m; load 3 kNm about minor at top; load 0.5 kNm about minor at base }
column I36 as I1 { load 100 kN; load 1 kN/m about minor }
column I37 as I1 { load 100 kN; load 3 kN across minor at 2 m }
column I38 as I1 { base fixed about minor; top pinned about minor; hold minor at 1 m; load 150 kN; load 20 kNm about major at top }
column T20 as I1 { section = box2; load 100 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column W1 as I1 { section = wide; load 300 kN; load 40 kNm about major at top; load 40 kNm about minor at top }
column W2 as I1 { section = slim; load 100 kN; load 60 kNm about major at top; load 4 kNm about minor at top }
column W3 as I1 { section = deep; load 300 kN; load 400 kNm about major at top; load 30 kNm about minor at top }
column W4 as I1 { section = thinI; load 100 kN; load 300 kNm about major at top; load 30 kNm about minor at top }
column W5 as I1 { section = class3; load 900 kN; load 60 kNm about major at top; load 20 kNm about minor at top }
column W6 as I1 { section = class3; load 100 kN; load 900 kN across major at 0.1 m; load 2000 kN across minor at 0.1 m }
column W7 as I1 { section = class3; load 100 kN; load 900 kN across major at 0.1 m }
column W8 as I1 { section = class3; load 100 kN; load 1800 kN across minor at 0.1 m }
column W9 as I1 { section = class3; height = 1 m; load 100 kN; load 60 kNm about major at top; load 20 kNm about minor at top }
column T1 as I1 { section = shs; load 300 kN; load 20 kNm about major at top; load 10 kNm about minor at top }
column T2 as I1 { section = rhs; load 300 kN; load 20 kNm about major at top; load 10 kNm about minor at top }
column T3 as I1 { section = flatrhs; height = 12 m; load 10 kN; load 60 kNm about major at top }
column T4 as I1 { section = c3rhs; load 300 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column T5 as I1 { section = c4rhs; load 100 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column T6 as I1 { section = c4thin; load 100 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column T7 as I1 { section = c4box; load 100 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column T8 as I1 { section = c4boxthin; load 100 kN; load 10 kNm about major at top; load 10 kNm about minor at top }
column T9 as I1 { section = box; load 100 kN; load 10 kNm about major at top }
column T10 as I1 { section = box; load 100 kN; load 10 kNm about minor at top }
column T11 as I1 { section = rhs; load 100 kN; load 10 kNm about minor at top }
column T12 as I1 { section = rhs; load 100 kN; load 10 kNm about major at top }
column T13 as I1 { section = c3rhs; load 10 kNm about major at top }
column T14 as I1 { section = rhs; height = 1 m; load 10 kN; load 550 kN across major at 0.1 m; load 260 kN across minor at 0.1 m }
column T15 as I1 { section = c3rhs; load 30 kNm about minor at top }
column T16 as I1 { section = box; load 10 kNm about minor at top }
column T17 as I1 { section = box; load 10 kNm about major at top }
column T18 as I1 { section = rhs; load 10 kNm about minor at top }
column T19 as I1 { section = c4rhs; load 20 kN; load 10 kN across major at 1 m }
column P1 as I1 { section = chs; load 300 kN; load 20 kNm about major at top; load 10 kNm about minor at top }
column P2 as I1 { section = rnd; height = 2 m; load 100 kN; load 5 kNm about major at top; load 2 kNm about minor at top }
column P3 as I1 { section = flat; height = 2 m; load 100 kN; load 5 kNm about major at top; load 1 kNm about minor at top }
column P4 as I1 { section = sq; height = 2 m; load 100 kN; load 5 kNm about major at top; load 1 kNm about minor at top }
column P5 as I1 { section = flat; height = 2 m; load 1700 kN; load 5 kNm about major at top; load 1 kNm about minor at top }
column P6 as I1 { section = tee1; height = 2 m; load 100 kN; load 2 kNm about minor at top }
column P7 as I1 { section = lun; height = 2 m; load 100 kN }
column P8 as I1 { section = told; load 100 kN; load 20 kNm about major at top; load 3 kNm about minor at top }
column P9 as I1 { section = "UPN 200"; load 100 kN; load 20 kNm about major at top }
column P10 as I1 { section = chs; load 300 kN; load 20 kNm about major at top; load 20 kNm about major at base }
tie N1 { section = ipe; material = steel; length = 3 m; load -500 kN; load 10 kNm about major at top; load 3 kNm about minor at top }
tie N2 { section = ipe; material = mild; length = 3 m; load -200 kN }
`
