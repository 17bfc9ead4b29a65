-- The language server of kern for Neovim 0.7 and later:
--   require('kern').setup {}
local M = {}

local options = {
  cmd = { 'kern', 'lsp' },
  settings = {}, -- for instance { inlayHints = { units = false } }
  on_attach = nil, -- function(client, buffer), for keys
}

-- root is the checkout that a file belongs to, or its folder.
local function root(file)
  local folder = vim.fn.fnamemodify(file, ':p:h')
  local git = vim.fn.finddir('.git', folder .. ';')
  if git == '' then
    git = vim.fn.findfile('.git', folder .. ';') -- a linked work tree
  end
  if git == '' then
    return folder
  end
  return vim.fn.fnamemodify(git, ':p:s?/$??:h')
end

local function attached(client, buffer)
  local caps = client.server_capabilities
  if caps.inlayHintProvider and vim.lsp.inlay_hint then -- Neovim 0.10
    vim.lsp.inlay_hint.enable(true, { bufnr = buffer })
  end
  if caps.codeLensProvider then
    vim.api.nvim_create_autocmd({ 'BufEnter', 'InsertLeave', 'BufWritePost' }, {
      buffer = buffer,
      callback = function()
        vim.lsp.codelens.refresh()
      end,
    })
  end
  vim.bo[buffer].omnifunc = 'v:lua.vim.lsp.omnifunc'
  if options.on_attach then
    options.on_attach(client, buffer)
  end
end

-- capabilities adds what Neovim does but says of itself only in later releases.
local function capabilities()
  return vim.tbl_deep_extend('keep', vim.lsp.protocol.make_client_capabilities(), {
    textDocument = {
      formatting = { dynamicRegistration = false },
      rangeFormatting = { dynamicRegistration = false },
      codeLens = { dynamicRegistration = false },
    },
    workspace = { executeCommand = { dynamicRegistration = false } },
  })
end

local running = {} -- client by root

-- attach gives the buffer a server, one for each root.
function M.attach(buffer)
  if vim.fn.executable(options.cmd[1]) == 0 then
    vim.notify("kern: there is no program '" .. options.cmd[1] .. "'; put kern on the PATH or name it: require('kern').setup { cmd = { '/path/to/kern', 'lsp' } }", vim.log.levels.WARN)
    return
  end
  local dir = root(vim.api.nvim_buf_get_name(buffer))
  local id = running[dir]
  if not id or not vim.lsp.get_client_by_id(id) then
    id = vim.lsp.start_client {
      name = 'kern',
      cmd = options.cmd,
      root_dir = dir,
      workspace_folders = { { uri = vim.uri_from_fname(dir), name = vim.fn.fnamemodify(dir, ':t') } },
      settings = { kern = options.settings },
      capabilities = capabilities(),
      on_attach = attached,
    }
    running[dir] = id
  end
  if id then
    vim.lsp.buf_attach_client(buffer, id)
  end
end

function M.setup(own)
  options = vim.tbl_extend('force', options, own or {})
  vim.api.nvim_create_autocmd('FileType', {
    group = vim.api.nvim_create_augroup('kern', { clear = true }),
    pattern = 'kern',
    callback = function(event)
      M.attach(event.buf)
    end,
  })
end

return M
