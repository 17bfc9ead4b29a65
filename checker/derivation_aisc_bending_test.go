package checker_test

// aiscBendingBases are settings that change how bending is checked.
var aiscBendingBases = []string{
	"basis { standard \"ANSI/AISC 360-22\" by LRFD; B_2 = 1.15 because \"frame analysis\"; C_b = 1.2 because \"table\"; C_m = 0.85 because \"analysis\" }",
	"basis { standard \"ANSI/AISC 360-22\" by ASD; B_2 = 1.15 because \"frame analysis\" }",
}

// aiscBending are members that come to formulas of chapters F to H and appendices
// 6 and 8 of ANSI/AISC 360.
const aiscBending = `
section bwide  = isection { depth = 300 mm; width = 400 mm; web = 10 mm; flange = 12 mm; made = welded }
section bslim  = isection { depth = 500 mm; width = 500 mm; web = 12 mm; flange = 8 mm; made = welded }
section bnc    = isection { depth = 900 mm; width = 300 mm; web = 8 mm; flange = 20 mm; made = welded }
section bncf   = isection { depth = 900 mm; width = 400 mm; web = 8 mm; flange = 18 mm; made = welded }
section bncs   = isection { depth = 900 mm; width = 600 mm; web = 8 mm; flange = 10 mm; made = welded }
section bsl    = isection { depth = 1000 mm; width = 300 mm; web = 5 mm; flange = 20 mm; made = welded }
section bslf   = isection { depth = 1000 mm; width = 400 mm; web = 5 mm; flange = 18 mm; made = welded }
section bsls   = isection { depth = 1000 mm; width = 600 mm; web = 5 mm; flange = 10 mm; made = welded }
section bover  = isection { depth = 1500 mm; width = 300 mm; web = 5 mm; flange = 20 mm; made = welded }
section brect  = tube { depth = 250 mm; width = 150 mm; wall = 5 mm; made = cold }
section bflat  = tube { depth = 400 mm; width = 80 mm; wall = 6 mm; made = hot }
section bnarrow = tube { depth = 400 mm; width = 80 mm; wall = 4 mm; made = hot }
section bthin  = tube { depth = 300 mm; width = 200 mm; wall = 4 mm; made = cold }
section bnon   = tube { depth = 180 mm; width = 170 mm; wall = 5 mm; made = cold }
section bdeep  = tube { depth = 500 mm; width = 100 mm; wall = 3 mm; made = cold }
section bwalls = tube { depth = 420 mm; width = 400 mm; wall = 6 mm; made = cold }
section blow   = tube { depth = 120 mm; width = 500 mm; wall = 3 mm; made = cold }
section bbox   = tube { depth = 500 mm; width = 400 mm; wall = 8 mm; corner = 0 mm; made = welded }
section bpipe  = pipe { outside = 500 mm; wall = 6 mm; made = cold }
section bpipes = pipe { outside = 900 mm; wall = 4 mm; made = cold }
section bflatbar = bar { width = 20 mm; depth = 200 mm }
section btee   = tee { depth = 150 mm; width = 150 mm; web = 14 mm; flange = 14 mm; made = welded }
section bteen  = tee { depth = 200 mm; width = 180 mm; web = 8 mm; flange = 8 mm; made = welded }
section btees  = tee { depth = 300 mm; width = 400 mm; web = 6 mm; flange = 7 mm; made = welded }
section bteel  = tee { depth = 500 mm; width = 300 mm; web = 12 mm; flange = 6 mm; made = welded }
section bteew  = tee { depth = 100 mm; width = 300 mm; web = 10 mm; flange = 14 mm; made = welded }
section bteewn = tee { depth = 100 mm; width = 300 mm; web = 6 mm; flange = 12 mm; made = welded }
section bteews = tee { depth = 150 mm; width = 500 mm; web = 6 mm; flange = 8 mm; made = welded }
section bell   = angle { depth = 100 mm; wall = 12 mm; root = 12 mm }
section belln  = angle { depth = 100 mm; width = 75 mm; wall = 7 mm; root = 10 mm }
section bells  = angle { depth = 150 mm; wall = 6 mm; root = 12 mm }
section bstand = isection { depth = 700 mm; width = 200 mm; web = 7 mm; flange = 12 mm; root = 12 mm; made = rolled }
column F1 { section = "HEB 200"; material = hard; height = 3 m; load 200 kN; load 20 kNm about major at top; load 5 kNm about minor at top }
column F2 as F1 { height = 9 m }
column F3 as F1 { height = 20 m; load 20 kN; load 10 kNm about major at top }
column F4 as F1 { height = 20 m; load 20 kN; load 5 kNm about minor at top }
column F5 as F1 { load 10 kN; load 20 kNm about major at top; load 5 kNm about minor at top }
column F6 as F1 { load 900 kN; load 2 kN/m about major }
column F7 as F1 { load 900 kN; load 2 kN/m about minor; hold minor at 1 m; hold major at 2 m; hold twist at 1 m }
column F8 as F1 { base fixed; top free; load 200 kN; load 10 kNm about major at top; load 2 kNm about minor at top }
column F9 as F1 { height = 12 m; load 3000 kN; load 10 kNm about major at top }
tie    F10 { section = "HEB 200"; material = hard; length = 6 m; load -200 kN; load 20 kNm about major at top; load 5 kNm about minor at top }
tie    F11 as F10 { load -1500 kN; load 20 kNm about major at top }
column O1 as F1 { section = bwide }
column O2 as F1 { section = bslim }
column O3 as F1 { section = bnc; height = 2 m }
column O4 as F1 { section = bnc; height = 7 m }
column O5 as F1 { section = bnc; height = 25 m }
column O6 as F1 { section = bncf }
column O7 as F1 { section = bncs }
column O8 as F1 { section = bsl; height = 2 m }
column O9 as F1 { section = bsl; height = 7 m }
column O10 as F1 { section = bsl; height = 25 m }
column O11 as F1 { section = bslf }
column O12 as F1 { section = bsls }
column O13 as F1 { section = bover }
column O14 as F1 { section = "UPN 200"; load 50 kN; load 20 kNm about major at top; load 5 kNm about minor at top }
column O15 as F1 { section = bstand; load 100 kN; load 200 kN across major at 1 m }
column T1 as F1 { section = brect }
column T2 as F1 { section = brect; height = 30 m; load 10 kN; load 5 kNm about major at top }
column T3 as F1 { section = bflat; height = 10 m; load 10 kN; load 5 kNm about major at top }
column T4 as F1 { section = bflat; height = 150 m; load 1 N; load 5 kNm about major at top; selfweight off }
column T5 as F1 { section = bthin }
column T6 as F1 { section = bnon }
column T7 as F1 { section = bdeep }
column T8 as F1 { section = blow }
column T9 as F1 { section = bbox }
section bround = tube { depth = 200 mm; width = 150 mm; wall = 8 mm; corner = 24 mm; made = cold }
column T12 as F1 { section = bround }
column T11 as F1 { section = bwalls }
column T10 as F1 { section = bnarrow }
column P1 as F1 { section = bpipe }
column P2 as F1 { section = bpipes }
column P3 as F1 { section = solid; height = 1 m }
column B1 as F1 { section = flat; height = 1 m; load 20 kN; load 2 kNm about major at top; load 1 kNm about minor at top }
column B2 as F1 { section = bflatbar; height = 1 m; load 20 kN; load 2 kNm about major at top }
column B3 as F1 { section = bflatbar; height = 0.1 m; load 20 kN; load 2 kNm about major at top }
column B4 as F1 { section = bflatbar; height = 4 m; load 2 kN; load 2 kNm about major at top }
column S1 as F1 { section = btee; height = 2 m; load 20 kN; load 2 kNm about major at top }
column S2 as F1 { section = bteen; height = 2 m; load 20 kN; load 2 kNm about major at top }
column S3 as F1 { section = btees; height = 2 m; load 20 kN; load 2 kNm about minor at top }
column S4 as F1 { section = bteew; height = 2 m; load 20 kN; load 2 kNm about minor at top }
column S5 as F1 { section = bteewn; height = 2 m; load 20 kN; load 2 kNm about minor at top }
column S6 as F1 { section = bteews; height = 2 m; load 20 kN; load 2 kNm about minor at top }
column S8 as F1 { section = bteel; height = 2 m; load 20 kN; load 2 kNm about major at top }
column S7 as F1 { section = btee; height = 2 m; load 20 kN; load 2 kNm about minor at top }
column L11 as F1 { section = bell; height = 1 m; load 20 kN; load 2 kNm about major at top; load 1 kNm about minor at top }
column L12 as F1 { section = belln; height = 2 m; load 20 kN; load 2 kNm about major at top; load 1 kNm about minor at top }
column L13 as F1 { section = bells; height = 2 m; load 20 kN; load 2 kNm about major at top; load 1 kNm about minor at top }
column L14 as F1 { section = bell; height = 20 m; load 1 N; load 2 kNm about major at top; selfweight off }
column L15 as F1 { section = belln; height = 2 m; load 20 kN; load 2 kNm about major at top }
column L16 as F1 { section = belln; height = 2 m; load 20 kN; load 1 kNm about minor at top }
column V3 as F1 { height = 8 m; hold twist at 7 m; load 200 kN; load 20 kNm about major at top; load -19 kNm about major at base }
column V4 as S4 { hold twist at 1.9 m; height = 2 m; load 20 kN; load 2 kNm about minor at top; load -1.9 kNm about minor at base }
column V1 { section = "HEB 200"; material = hard; height = 8 m; lift base to 4 m { section = "HEB 260" }; load 200 kN; load 20 kNm about major at top; load 5 kNm about minor at top }
column V2 as V1 { hold both at 4 m; hold twist at 4 m }
material harder { E = 200 GPa; fy = 900 MPa; fu = 1000 MPa; density = 7850 kg/m3 }
column D13 as F1 { section = "2L6X4X1/2 SLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D14 as F1 { section = "2L6X4X1/2 SLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D15 as F1 { section = "2L6X4X1/2 SLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D16 as F1 { section = "2L6X4X1/2 SLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D17 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D18 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D19 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D20 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D21 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D22 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D23 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D24 as F1 { section = "2L5X3-1/2X1/4 LLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D25 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D26 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D27 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D28 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D29 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D30 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D31 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D32 as F1 { section = "2L5X3X1/4X3/4 SLBB"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D49 as F1 { section = "2L4X4X1/4"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D50 as F1 { section = "2L4X4X1/4"; material = hard; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D51 as F1 { section = "2L4X4X1/4"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D52 as F1 { section = "2L4X4X1/4"; material = hard; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D53 as F1 { section = "2L4X4X1/4"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D54 as F1 { section = "2L4X4X1/4"; material = harder; height = 1 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
column D55 as F1 { section = "2L4X4X1/4"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about major at top }
column D56 as F1 { section = "2L4X4X1/4"; material = harder; height = 5 m; connectors every 0.5 m welded; load 5 kN; load 0.5 kNm about minor at top }
`
