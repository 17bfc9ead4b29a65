" Settings of YouCompleteMe for kern, before the plugin is loaded.
let g:ycm_language_server = get(g:, 'ycm_language_server', []) + [{
      \ 'name': 'kern',
      \ 'cmdline': ['kern', 'lsp'],
      \ 'filetypes': ['kern'],
      \ 'project_root_files': ['.git'],
      \ 'capabilities': {'textDocument': {'inlayHint': {}}},
      \ }]
let g:ycm_enable_inlay_hints = 1
