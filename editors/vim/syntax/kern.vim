" Vim syntax of kern, column calculations as text.
if exists('b:current_syntax')
  finish
endif

syn spell toplevel
" What is matched later wins where two begin at the same place.
syn match kernOperator /[-+*\/^=<>]/
syn match kernDefinition /\v^\s*\zs[[:alpha:]_\u0370-\u03ff]\k*\ze\s*\=/
" generated: words
syn match kernParticle /\v<%(ASD|K_LL|LRFD|about|accidental|across|alone|and|annex|area|as|at|because|both|braced|buckling|by|cases|characteristic|cold|compression|continuous|dead|deflection|direct|effective|eq|every|exact|fixed|floor|free|frequent|from|general|guided|hot|imposed|independent|leg|lengths|live|long|major|minor|negative|nominal|off|offset|on|per|permanent|persistent|pinned|positive|pretensioned|psi_0|psi_1|psi_2|quasipermanent|rain|recommended|rolled|roof|secant|seismic|short|simple|slenderness|snow|snug|space|span|spring|stiffness|storeys|sway|temperature|theoretical|to|together|top|tributary|twist|under|utilisation|welded|wind)>/
syn match kernShape /\v<%(angle|bar|channel|doubleangle|given|isection|pipe|rod|tee|tube)>/
syn match kernFunction /\v<%(abs|cos|max|min|sin|sqrt|tan)>\ze\s*\(/
syn match kernConstant /\v<%(g|pi)>/
syn match kernProperty /\v%(^|[;{])\s*\zs<%(A|A_v_major|A_v_minor|E|G|I_major|I_minor|I_t|I_w|W_major|W_minor|Wpl_major|Wpl_minor|class|corner|curve|curve_major|curve_minor|density|depth|diameter|flange|fu|fy|gap|made|nu|outside|root|thickness|toe|wall|web|width)>\ze\s*\=/
syn match kernStatement /\v%(^|[;{])\s*\zs<%(accidental|actions|amplification|base|checked|choose|connected|connectors|critical|date|depart|effective|factor_buckling|factor_yield|from|gamma_G_inf|gamma_G_sup|gamma_M0|gamma_M1|gamma_Q|height|hold|imperfection|interaction|joints|lateral|length|lift|limit|load|material|moments|name|net|note|number|permanent|prepared|reduce|reduction|require|revision|roofs|section|selfweight|show|stability|standard|strengths|top|xi)>/ nextgroup=kernUnits skipwhite
syn match kernDeclaration /\v^\s*\zs<%(basis|case|column|combination|exclusive|forces|include|level|material|project|section|strut|tie)>%(\s*\=)@!/ nextgroup=kernName skipwhite
" end of words
syn match kernName contained /\v\k+%(\s*,\s*\k+)*/
syn match kernNumber /\v%(\k|\.)@1<![0-9][0-9_]*%(\.[0-9][0-9_]*)?%([eE][+-]?[0-9]+\k@!)?/ nextgroup=kernUnit skipwhite
" generated: units
syn match kernUnit contained /\v%(kip-ft|kip-in|lbf-ft|lbf-in|kNcm|kNmm|kips|mrad|slug|GPa|MNm|MPa|Msi|Nmm|deg|kNm|kPa|kgf|kip|klf|ksf|ksi|lbf|min|pcf|plf|psf|psi|rad|µm|μm|‰|Hz|MN|Nm|Pa|cm|ft|in|kN|kg|km|lb|mm|um|yd|°|\%|N|h|m|s|t)%(\^?[0-9]|[⁰¹²³⁴⁵⁶⁷⁸⁹])?%([*\/·]%(kip-ft|kip-in|lbf-ft|lbf-in|kNcm|kNmm|kips|mrad|slug|GPa|MNm|MPa|Msi|Nmm|deg|kNm|kPa|kgf|kip|klf|ksf|ksi|lbf|min|pcf|plf|psf|psi|rad|µm|μm|‰|Hz|MN|Nm|Pa|cm|ft|in|kN|kg|km|lb|mm|um|yd|°|\%|N|h|m|s|t)%(\^?[0-9]|[⁰¹²³⁴⁵⁶⁷⁸⁹])?)*%([[:alnum:]_])@!/
" end of units
syn match kernUnits contained /\v%(<show\s+)@<=[^;}#]+/ contains=kernUnit
syn region kernText start=/"/ end=/"/ oneline contains=@Spell
syn match kernComment /#.*$/ contains=@Spell

hi def link kernComment Comment
hi def link kernText String
hi def link kernNumber Number
hi def link kernUnit Type
hi def link kernDeclaration Keyword
hi def link kernStatement Statement
hi def link kernProperty Identifier
hi def link kernDefinition Identifier
hi def link kernName Title
hi def link kernShape Structure
hi def link kernParticle Special
hi def link kernFunction Function
hi def link kernConstant Constant
hi def link kernOperator Operator

let b:current_syntax = 'kern'
