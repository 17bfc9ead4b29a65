" Vim indentation of kern: one level for each open brace or bracket.
if exists('b:did_indent')
  finish
endif
let b:did_indent = 1

setlocal indentexpr=KernIndent()
setlocal indentkeys=0},0),o,O,!^F
setlocal nosmartindent nocindent
let b:undo_indent = 'setlocal indentexpr< indentkeys< smartindent< cindent<'

if exists('*KernIndent')
  finish
endif

" s:Signs gives the signs of a line without its texts and its comment.
function! s:Signs(line) abort
  return substitute(substitute(a:line, '"[^"]*"', '', 'g'), '["#].*$', '', '')
endfunction

function! KernIndent() abort
  let l:above = prevnonblank(v:lnum - 1)
  if l:above == 0
    return 0
  endif
  let l:signs = s:Signs(getline(l:above))
  let l:opened = count(l:signs, '{') + count(l:signs, '(')
  " A closing sign that begins the line has moved that line already.
  let l:closed = count(l:signs, '}') + count(l:signs, ')') - len(matchstr(l:signs, '^\s*\zs[})]*'))
  let l:levels = l:opened - l:closed
  if getline(v:lnum) =~# '^\s*[})]'
    let l:levels -= 1
  endif
  return max([0, indent(l:above) + l:levels * shiftwidth()])
endfunction
