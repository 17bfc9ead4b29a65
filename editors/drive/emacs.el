;;; emacs.el --- Drives Emacs against the built server -*- lexical-binding: t; -*-

;; PROJECT is a copy of testdata with a .git folder, `kern' is on the PATH.

(add-to-list 'load-path (expand-file-name "emacs" (getenv "EDITORS")))
(require 'eglot)
(require 'kern-mode)
(setq eglot-sync-connect 60
      eglot-connect-timeout 60
      flymake-no-changes-timeout 0.1
      create-lockfiles nil
      make-backup-files nil)
(add-hook 'kern-mode-hook #'eglot-ensure)

(defvar drive-patience 60 "Seconds; the machine may be busy.")

(defun drive-wait (what condition)
  "Wait until CONDITION gives a value, and give it; WHAT is for the message."
  (let ((end (+ (float-time) drive-patience)) value)
    (while (not (setq value (funcall condition)))
      (when (> (float-time) end) (error "Waited in vain for %s" what))
      (accept-process-output nil 0.05)
      (sit-for 0.01))
    value))

(defun drive-expect (what got want)
  "Fail unless GOT is WANT; WHAT is for the message."
  (unless (equal got want) (error "%s: got %S, want %S" what got want)))

(defun drive-open (file)
  "Open FILE of the project and have it managed."
  (switch-to-buffer (find-file-noselect (expand-file-name file (getenv "PROJECT"))))
  ;; `eglot-ensure' waits for a command to end, which never comes in batch mode.
  (unless (eglot-current-server) (apply #'eglot--connect (eglot--guess-contact)))
  (unless (eglot-managed-p) (eglot--maybe-activate-editing-mode))
  (drive-wait "the server" (lambda () (eglot-managed-p)))
  (flymake-start))

(defun drive-diagnostics ()
  "The diagnostics of the buffer as \"line text\"."
  (mapcar (lambda (d) (format "%d %s" (line-number-at-pos (flymake-diagnostic-beg d)) (flymake-diagnostic-text d)))
          (flymake-diagnostics)))

(defun drive-marked (pattern)
  "Whether a diagnostic of the buffer matches PATTERN."
  (seq-some (lambda (d) (string-match-p pattern d)) (drive-diagnostics)))

(defun drive-face (text)
  "The face of the first letter of TEXT, the first one in the buffer."
  (font-lock-ensure)
  (save-excursion
    (goto-char (point-min))
    (search-forward text)
    (get-text-property (match-beginning 0) 'face)))

(defvar drive-steps
  `(("the mode is known and words, names and units are highlighted"
     ,(lambda ()
        (drive-open "boathouse/gallery.kern")
        (drive-expect "mode" major-mode 'kern-mode)
        (drive-expect "column" (drive-face "column P4") 'font-lock-keyword-face)
        (drive-expect "P4" (drive-face "P4 ") 'font-lock-type-face)
        (drive-expect "load" (drive-face "load G") 'font-lock-keyword-face)
        (drive-expect "kN" (drive-face "kN\n") 'font-lock-builtin-face)))
    ("indentation is the layout of the formatter"
     ,(lambda ()
        (let ((text (buffer-string)))
          (with-temp-buffer
            (insert text)
            (kern-mode)
            (goto-char (point-min))
            (while (re-search-forward "^ +" nil t) (replace-match ""))
            (let ((inhibit-message t)) (indent-region (point-min) (point-max)))
            (drive-expect "text" (buffer-string) (substring-no-properties text))))))
    ("failing members are marked"
     ,(lambda ()
        (drive-wait "diagnostics" #'flymake-diagnostics)
        (drive-wait "P4" (lambda () (drive-marked "^16 .*P4 fails flexural-buckling-major")))
        (drive-expect "P6" (and (drive-marked "^27 .*P6 fails flexural-buckling-minor") t) t)
        (drive-expect "P1" (drive-marked "P1 fails") nil)))
    ("a mended unit clears its mark"
     ,(lambda ()
        (drive-open "slips/canopy.kern")
        (drive-wait "the mark of the unit" (lambda () (drive-marked "^18 .*'Kn' is not a unit")))
        (goto-char (point-min))
        (search-forward "25 Kn")
        (replace-match "25 kN" t)
        (eglot--signal-textDocument/didChange)
        (drive-wait "the mark to go" (lambda () (not (drive-marked "^18 "))))
        (drive-expect "another mark" (and (drive-marked "^16 .*needs a unit of length") t) t)))
    ("completion knows the place"
     ,(lambda ()
        (goto-char (point-min))
        (search-forward "column K3")
        (end-of-line)
        (insert "\n    ho")
        (eglot--signal-textDocument/didChange)
        (let* ((found (eglot-completion-at-point))
               (words (all-completions "ho" (nth 2 found))))
          (drive-expect "hold" (and (member "hold" (mapcar #'substring-no-properties words)) t) t)
          (drive-expect "column" (all-completions "column" (nth 2 found)) nil))
        (delete-region (line-beginning-position 0) (line-end-position))
        (insert "column K3 \"Canopy post, corner\" {")
        (eglot--signal-textDocument/didChange)))
    ("a hover shows the verdicts of a member"
     ,(lambda ()
        (drive-open "boathouse/gallery.kern")
        (goto-char (point-min))
        (search-forward "column P4")
        (backward-char)
        (let (said)
          (eglot-hover-eldoc-function (lambda (text &rest _) (setq said (format "%s" text))))
          (drive-wait "the hover" (lambda () said))
          (drive-expect "the verdict" (and (string-match-p "fails" said) t) t)
          (drive-expect "the table" (and (string-match-p "flexural-buckling-minor.*1\\.18.*6\\.3\\.1" said) t) t))))
    ("a name is renamed in every file"
     ,(lambda ()
        (goto-char (point-min))
        (search-forward "section  = prop")
        (backward-char)
        (cl-letf (((symbol-function 'y-or-n-p) (lambda (_) t))) ; it asks before it changes other files
          (eglot-rename "small_post"))
        (drive-expect "here" (count-matches "= small_post" (point-min) (point-max)) 2)
        (drive-expect "the old name" (count-matches "= prop" (point-min) (point-max)) 0)
        (with-current-buffer (find-file-noselect (expand-file-name "boathouse/steel.kern" (getenv "PROJECT")))
          (drive-expect "there" (count-matches "^section small_post *= \"SHS 90x90x5\"" (point-min) (point-max)) 1))))
    ("formatting gives the one layout"
     ,(lambda ()
        (let ((before (substring-no-properties (buffer-string))))
          (goto-char (point-min))
          (while (re-search-forward "^    " nil t) (replace-match "  "))
          (goto-char (point-min))
          (while (re-search-forward " *= " nil t) (replace-match " ="))
          (eglot--signal-textDocument/didChange)
          (eglot-format-buffer)
          (drive-expect "text" (substring-no-properties (buffer-string)) before))))))

(dolist (step drive-steps)
  (condition-case problem
      (progn (funcall (cadr step)) (princ (format "ok    %s\n" (car step))))
    (error
     (princ (format "FAIL  %s\n%s\n" (car step) (error-message-string problem)))
     (kill-emacs 1))))
(set-buffer-modified-p nil)
(let ((inhibit-message t)) (eglot-shutdown-all))
(kill-emacs 0)
;;; emacs.el ends here
