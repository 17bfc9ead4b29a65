-- Drives Neovim against the built server. PROJECT is a copy of testdata with a
-- .git folder, `kern` is on the PATH.
vim.opt.runtimepath:prepend(os.getenv 'EDITORS' .. '/neovim')
vim.opt.swapfile = false
vim.cmd 'syntax on | filetype plugin indent on'
require('kern').setup {}

local project = os.getenv 'PROJECT'
local patience = 60000 -- milliseconds; the machine may be busy

local function wait(what, condition)
  local value
  local ok = vim.wait(patience, function()
    value = condition()
    return value
  end, 20)
  assert(ok, 'waited in vain for ' .. what)
  return value
end

local function expect(what, got, want)
  assert(vim.deep_equal(got, want), what .. ': got ' .. vim.inspect(got) .. ', want ' .. vim.inspect(want))
end

local function open(file)
  vim.cmd('edit ' .. vim.fn.fnameescape(project .. '/' .. file))
  return vim.api.nvim_get_current_buf()
end

-- diagnostics gives "line:column rule" of each diagnostic, from 1, sorted.
local function diagnostics(buffer)
  local out = {}
  for _, d in ipairs(vim.diagnostic.get(buffer)) do
    table.insert(out, string.format('%d:%d %s', d.lnum + 1, d.col + 1, d.code or d.user_data.lsp.code))
  end
  table.sort(out)
  return out
end

local function group(line, column)
  return vim.fn.synIDattr(vim.fn.synID(line, column, 1), 'name')
end

local steps = {
  { 'the file type and the layout are known', function()
    open 'boathouse/gallery.kern'
    expect('filetype', vim.bo.filetype, 'kern')
    expect('shiftwidth', vim.bo.shiftwidth, 4)
    expect('commentstring', vim.bo.commentstring, '# %s')
  end },
  { 'words, names and units are highlighted', function()
    local line = vim.fn.search '^column P4'
    expect('column', group(line, 1), 'kernDeclaration')
    expect('P4', group(line, 8), 'kernName')
    expect('load', group(line + 1, 5), 'kernStatement')
    expect('kN', group(line + 1, 16), 'kernUnit')
  end },
  { 'indentation is the layout of the formatter', function()
    local before = vim.api.nvim_buf_get_lines(0, 0, -1, true)
    vim.cmd [[silent %s/^ *//]]
    vim.cmd 'silent normal! gg=G'
    expect('lines', vim.api.nvim_buf_get_lines(0, 0, -1, true), before)
    vim.cmd 'edit!'
  end },
  { 'failing members are marked', function()
    local buffer = vim.api.nvim_get_current_buf()
    wait('diagnostics', function()
      return #vim.diagnostic.get(buffer) > 0
    end)
    expect('diagnostics', diagnostics(buffer), {
      '16:8 flexural-buckling-major', '16:8 flexural-buckling-minor', '27:8 flexural-buckling-major', '27:8 flexural-buckling-minor', '34:8 undecided',
    })
  end },
  { 'a mended unit clears its mark', function()
    local buffer = open 'slips/canopy.kern'
    local function marked()
      return vim.tbl_contains(diagnostics(buffer), '18:15 unknown-unit')
    end
    wait('the mark of the unit', marked)
    vim.api.nvim_buf_set_lines(buffer, 17, 18, true, { '    load S 25 kN' })
    wait('the mark to go', function()
      return not marked()
    end)
    expect('another mark stays', vim.tbl_contains(diagnostics(buffer), '16:16 missing-unit'), true)
  end },
}

for _, step in ipairs(steps) do
  local ok, message = xpcall(step[2], debug.traceback)
  io.stdout:write((ok and 'ok    ' or 'FAIL  ') .. step[1] .. '\n')
  if not ok then
    io.stdout:write(message .. '\n')
    vim.cmd 'cquit 1'
  end
end
vim.cmd 'qall!'
