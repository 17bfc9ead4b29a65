" Settings of YouCompleteMe for kern, before the plugin is loaded.
let g:ycm_language_server = get(g:, 'ycm_language_server', []) + [{
      \ 'name': 'kern',
      \ 'cmdline': ['kern', 'lsp'],
      \ 'filetypes': ['kern'],
      \ 'project_root_files': ['.git'],
      \ }]
let g:ycm_enable_inlay_hints = 1
let g:ycm_enable_semantic_highlighting = 1
