autocmd BufRead,BufNewFile *.kern set filetype=kern
