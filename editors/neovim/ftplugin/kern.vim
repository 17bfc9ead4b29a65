" What an editor should know of a kern file.
if exists('b:did_ftplugin')
  finish
endif
let b:did_ftplugin = 1

setlocal comments=:# commentstring=#\ %s
setlocal expandtab shiftwidth=4 softtabstop=4
setlocal formatoptions-=t formatoptions+=croql
setlocal include=^\\s*include\\s\\+" suffixesadd=.kern
let b:undo_ftplugin = 'setlocal comments< commentstring< expandtab< shiftwidth< softtabstop< formatoptions< include< suffixesadd<'
