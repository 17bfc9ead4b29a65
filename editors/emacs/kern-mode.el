;;; kern-mode.el --- Column calculations as text -*- lexical-binding: t; -*-

;; SPDX-License-Identifier: Apache-2.0
;; Version: 0.1.0
;; Package-Requires: ((emacs "27.1"))
;; Keywords: languages

;;; Commentary:

;; A major mode for kern files, with `eglot' for the language server:
;;
;;   (add-to-list 'load-path "/path/to/editors/emacs")
;;   (require 'kern-mode)
;;   (add-hook 'kern-mode-hook #'eglot-ensure)

;;; Code:

(defgroup kern nil
  "Column calculations as text."
  :group 'languages)

(defcustom kern-mode-server '("kern" "lsp")
  "Command that starts the language server."
  :type '(repeat string))

(defcustom kern-mode-indent 4
  "Columns of a level of blocks."
  :type 'integer
  :safe #'integerp)

;; generated: declarations
(defconst kern-mode-declarations
  '("basis" "case" "column" "combination" "exclusive" "forces" "include" "level" "material"
    "project" "section" "strut" "tie")
  "Words that begin a declaration.")
;; end of declarations

;; generated: statements
(defconst kern-mode-statements
  '("accidental" "actions" "amplification" "base" "checked" "choose" "connected" "connectors"
    "critical" "date" "depart" "effective" "factor_buckling" "factor_yield" "from" "gamma_G_inf"
    "gamma_G_sup" "gamma_M0" "gamma_M1" "gamma_Q" "height" "hold" "imperfection" "interaction"
    "joints" "lateral" "length" "lift" "limit" "load" "material" "moments" "name" "net" "note"
    "number" "permanent" "prepared" "reduce" "reduction" "require" "revision" "roofs" "section"
    "selfweight" "show" "stability" "standard" "strengths" "top" "xi")
  "Words that begin a line in a block.")
;; end of statements

;; generated: properties
(defconst kern-mode-properties
  '("A" "A_v_major" "A_v_minor" "E" "G" "I_major" "I_minor" "I_t" "I_w" "W_major" "W_minor"
    "Wpl_major" "Wpl_minor" "class" "corner" "curve" "curve_major" "curve_minor" "density" "depth"
    "diameter" "flange" "fu" "fy" "gap" "made" "nu" "outside" "root" "thickness" "toe" "wall" "web"
    "width")
  "Words before an equals sign in the block of a material or shape.")
;; end of properties

;; generated: shapes
(defconst kern-mode-shapes
  '("angle" "bar" "channel" "doubleangle" "given" "isection" "pipe" "rod" "tee" "tube")
  "Words for cross-sections.")
;; end of shapes

;; generated: particles
(defconst kern-mode-particles
  '("ASD" "K_LL" "LRFD" "about" "accidental" "across" "alone" "and" "annex" "area" "as" "at"
    "because" "both" "braced" "buckling" "by" "cases" "characteristic" "cold" "compression"
    "continuous" "dead" "deflection" "direct" "effective" "eq" "every" "exact" "fixed" "floor"
    "free" "frequent" "from" "general" "guided" "hot" "imposed" "independent" "leg" "lengths" "live"
    "long" "major" "minor" "negative" "nominal" "off" "offset" "on" "per" "permanent" "persistent"
    "pinned" "positive" "pretensioned" "psi_0" "psi_1" "psi_2" "quasipermanent" "rain" "recommended"
    "rolled" "roof" "secant" "seismic" "short" "simple" "slenderness" "snow" "snug" "space" "span"
    "spring" "stiffness" "storeys" "sway" "temperature" "theoretical" "to" "together" "top"
    "tributary" "twist" "under" "utilisation" "welded" "wind")
  "Words inside statements.")
;; end of particles

;; generated: functions
(defconst kern-mode-functions
  '("abs" "cos" "max" "min" "sin" "sqrt" "tan")
  "Functions in expressions.")
;; end of functions

;; generated: constants
(defconst kern-mode-constants
  '("g" "pi")
  "Constants in expressions.")
;; end of constants

;; generated: units
(defconst kern-mode-units
  '("kip-ft" "kip-in" "lbf-ft" "lbf-in" "kNcm" "kNmm" "kips" "mrad" "slug" "GPa" "MNm" "MPa" "Msi"
    "Nmm" "deg" "kNm" "kPa" "kgf" "kip" "klf" "ksf" "ksi" "lbf" "min" "pcf" "plf" "psf" "psi" "rad"
    "µm" "μm" "‰" "Hz" "MN" "Nm" "Pa" "cm" "ft" "in" "kN" "kg" "km" "lb" "mm" "um" "yd" "°" "%"
    "N" "h" "m" "s" "t")
  "Symbols of units, longer ones first.")
;; end of units

(defconst kern-mode--start "\\(?:^\\|[;{]\\)[ \t]*"
  "Where a statement can begin.")

(defconst kern-mode--unit
  (let ((atom (concat (regexp-opt kern-mode-units) "\\(?:\\^?[0-9]\\|[⁰¹²³⁴⁵⁶⁷⁸⁹]\\)?")))
    (concat atom "\\(?:[*/·]" atom "\\)*"))
  "A unit with its exponents.")

(defconst kern-mode--number
  "\\_<[0-9][0-9_]*\\(?:\\.[0-9][0-9_]*\\)?\\(?:[eE][+-]?[0-9]+\\)?"
  "A number.")

(defun kern-mode--words (words)
  "Pattern of any of WORDS."
  (concat "\\_<\\(" (regexp-opt words) "\\)\\_>"))

(defvar kern-mode-font-lock
  `((,(concat "^[ \t]*" (kern-mode--words kern-mode-declarations)
              "\\(?:[ \t]+\\([[:alpha:]_][[:alnum:]_]*\\(?:[ \t]*,[ \t]*[[:alpha:]_][[:alnum:]_]*\\)*\\)\\)?[ \t]*\\(?:$\\|[^= \t]\\|=.*?{\\|=[ \t]*\"\\)")
     (1 font-lock-keyword-face)
     (2 font-lock-type-face nil t))
    (,(concat kern-mode--start (kern-mode--words kern-mode-properties) "[ \t]*=") 1 font-lock-variable-name-face)
    (,(concat kern-mode--start "\\_<show\\_>")
     (,(concat "\\_<" kern-mode--unit) nil nil (0 font-lock-builtin-face)))
    (,(concat kern-mode--start (kern-mode--words kern-mode-statements)) 1 font-lock-keyword-face)
    ("^[ \t]*\\_<\\([[:alpha:]_][[:alnum:]_]*\\)\\_>[ \t]*=" 1 font-lock-variable-name-face)
    (,(concat "\\(" kern-mode--number "\\)\\(?:[ \t]?\\(" kern-mode--unit "\\)\\(?:[^[:alnum:]_]\\|$\\)\\)?")
     (1 font-lock-constant-face)
     (2 font-lock-builtin-face nil t))
    (,(concat (kern-mode--words kern-mode-functions) "[ \t]*(") 1 font-lock-function-name-face)
    (,(kern-mode--words kern-mode-constants) 1 font-lock-constant-face)
    (,(kern-mode--words kern-mode-shapes) 1 font-lock-type-face)
    (,(kern-mode--words kern-mode-particles) 1 font-lock-builtin-face))
  "What `kern-mode' highlights.")

(defvar kern-mode-syntax-table
  (let ((table (make-syntax-table)))
    (modify-syntax-entry ?# "<" table)
    (modify-syntax-entry ?\n ">" table)
    (modify-syntax-entry ?_ "_" table)
    (modify-syntax-entry ?\\ "." table)
    (dolist (sign '(?+ ?- ?* ?/ ?^ ?= ?< ?> ?%))
      (modify-syntax-entry sign "." table))
    table)
  "Syntax of `kern-mode'.")

(defun kern-mode-indent-line ()
  "Indent the line by the braces and brackets that are open before it."
  (interactive)
  (let* ((depth (save-excursion
                  (beginning-of-line)
                  (let ((open (car (syntax-ppss))))
                    (skip-chars-forward " \t")
                    (if (looking-at-p "[})]") (1- open) open))))
         (column (* kern-mode-indent (max 0 depth))))
    (if (<= (current-column) (current-indentation))
        (indent-line-to column)
      (save-excursion (indent-line-to column)))))

;;;###autoload
(define-derived-mode kern-mode prog-mode "Kern"
  "Major mode for column calculations as text."
  (setq-local comment-start "# ")
  (setq-local comment-end "")
  (setq-local comment-start-skip "#+[ \t]*")
  (setq-local indent-tabs-mode nil)
  (setq-local indent-line-function #'kern-mode-indent-line)
  (setq-local electric-indent-chars (append "{}()" electric-indent-chars))
  (setq-local font-lock-defaults '(kern-mode-font-lock))
  (setq-local imenu-generic-expression
              `((nil ,(concat "^" (regexp-opt kern-mode-declarations t) "[ \t]+\\([[:alpha:]_][[:alnum:]_]*\\)") 2))))

;;;###autoload
(add-to-list 'auto-mode-alist '("\\.kern\\'" . kern-mode))

(defvar eglot-server-programs)
(with-eval-after-load 'eglot
  (add-to-list 'eglot-server-programs
               (cons 'kern-mode (lambda (&rest _) kern-mode-server))))

(provide 'kern-mode)
;;; kern-mode.el ends here
