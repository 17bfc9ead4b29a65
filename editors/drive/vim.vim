" Drives Vim with YouCompleteMe against the built server: vim -u drive/vim.vim
" PROJECT is a copy of testdata with a .git folder, `kern` is on the PATH.
set nocompatible encoding=utf-8 noswapfile nomore hidden shortmess+=I
let s:patience = 60 " seconds; the machine may be busy

function! s:Wait(what, condition) abort
  let l:start = localtime()
  while 1
    let l:value = a:condition()
    if !empty(l:value)
      return l:value
    endif
    if localtime() - l:start > s:patience
      throw 'waited in vain for ' . a:what
    endif
    sleep 50m
  endwhile
endfunction

function! s:Expect(what, got, want) abort
  if a:got !=# a:want
    throw a:what . ': got ' . string(a:got) . ', want ' . string(a:want)
  endif
endfunction

function! s:Open(file) abort
  execute 'edit ' . fnameescape($PROJECT . '/' . a:file)
endfunction

function! s:Group(line, column) abort
  return synIDattr(synID(a:line, a:column, 1), 'name')
endfunction

function! s:Highlight() abort
  call s:Open('boathouse/gallery.kern')
  call s:Expect('filetype', &filetype, 'kern')
  let l:line = search('^column P4')
  call s:Expect('column', s:Group(l:line, 1), 'kernDeclaration')
  call s:Expect('P4', s:Group(l:line, 8), 'kernName')
  call s:Expect('load', s:Group(l:line + 1, 5), 'kernStatement')
  call s:Expect('kN', s:Group(l:line + 1, 16), 'kernUnit')
endfunction

function! s:Indent() abort
  let l:before = getline(1, '$')
  silent %s/^ *//
  silent normal! gg=G
  call s:Expect('lines', getline(1, '$'), l:before)
  edit!
endfunction

" s:Marks gives the texts of the diagnostics by line.
function! s:Marks() abort
  silent YcmDiags
  let l:marks = map(getloclist(0), 'v:val.lnum . " " . v:val.text')
  lclose
  return l:marks
endfunction

function! s:Failing() abort
  let l:marks = s:Wait('diagnostics', function('s:Marks'))
  for l:want in ['^16 .*P4 fails flexural-buckling-major', '^27 .*P6 fails flexural-buckling-minor']
    if match(l:marks, l:want) < 0
      throw 'no ' . l:want . ' in ' . string(l:marks)
    endif
  endfor
endfunction

" s:Hints gives the inlay hints of a line as one text: they are virtual text.
function! s:Hints(line) abort
  return join(map(filter(prop_list(a:line), 'has_key(v:val, "text")'), 'v:val.text'), '|')
endfunction

function! s:Results() abort
  let l:line = search('^column P4')
  let l:hints = s:Wait('hints', {-> s:Hints(l:line)})
  if l:hints !~# '^fails 1\.\d\d flexural-buckling-m'
    throw 'hints of P4: ' . l:hints
  endif
  let l:hints = s:Hints(search('^column P1'))
  if l:hints !~# '^0\.\d\d flexural-buckling-m'
    throw 'hints of P1: ' . l:hints
  endif
endfunction

let s:steps = [
      \ ['words, names and units are highlighted', function('s:Highlight')],
      \ ['indentation is the layout of the formatter', function('s:Indent')],
      \ ['failing members are marked', function('s:Failing')],
      \ ['results stand at the ends of lines', function('s:Results')],
      \ ]

function! s:Run() abort
  let l:said = []
  let l:failed = 0
  for [l:name, l:Step] in s:steps
    try
      call l:Step()
      call add(l:said, 'ok    ' . l:name)
    catch
      call add(l:said, 'FAIL  ' . l:name)
      call add(l:said, v:exception . ' at ' . v:throwpoint)
      let l:failed = 1
      break
    endtry
  endfor
  call writefile(l:said, $SAID)
  execute l:failed ? 'cquit!' : 'qall!'
endfunction

let g:ycm_server_python_interpreter = '/usr/bin/python3' " Debian's, which has the plugin's modules
let &runtimepath = $EDITORS . '/vim,/usr/share/vim-youcompleteme,' . &runtimepath
execute 'source ' . fnameescape($EDITORS . '/vim/ycm.vim')
syntax on
filetype plugin indent on
" Once the plugins are loaded; not from a timer, as the plugin's own timers wait for one to end.
command Drive call s:Run()
autocmd VimEnter * call feedkeys(":Drive\<CR>")
