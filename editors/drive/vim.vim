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

" s:Screen gives what is seen of a line, hints and all.
function! s:Screen(line) abort
  redraw
  let l:row = screenpos(win_getid(), a:line, 1).row
  return join(map(range(1, &columns), 'screenstring(l:row, v:val)'), '')
endfunction

" s:Hinted waits for a hint behind a line that matches.
function! s:Hinted(line, hint) abort
  let l:number = search(a:line)
  let l:Seen = {-> s:Screen(l:number) =~# a:line . '.*{ *' . a:hint}
  call s:Wait(a:hint . ' at ' . a:line, {-> l:Seen() ? 'seen' : ''})
endfunction

function! s:Results() abort
  call s:Hinted('column P4', 'fails 1\.\d\d flexural-buckling-m')
  call s:Hinted('column P1', '0\.\d\d flexural-buckling-m.*pinned both ends')
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
