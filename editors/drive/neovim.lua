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

-- request asks the server of the buffer and gives its answer.
local function request(buffer, method, params)
  local answers = assert(vim.lsp.buf_request_sync(buffer, method, params, patience), 'no answer to ' .. method)
  for _, answer in pairs(answers) do
    assert(not answer.err, vim.inspect(answer.err))
    return answer.result
  end
end

-- replace puts other lines in place of the line that matches.
local function replace(buffer, pattern, ...)
  local line = vim.fn.search(pattern)
  assert(line > 0, 'no line ' .. pattern)
  vim.api.nvim_buf_set_lines(buffer, line - 1, line, true, { ... })
  return line
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
    for _, want in ipairs { '16:8 flexural-buckling-major', '16:8 flexural-buckling-minor', '27:8 flexural-buckling-major', '27:8 flexural-buckling-minor' } do
      assert(vim.tbl_contains(diagnostics(buffer), want), want .. ' is not in ' .. vim.inspect(diagnostics(buffer)))
    end
    for _, d in ipairs(vim.diagnostic.get(buffer)) do
      assert(d.lnum ~= 7 or d.severity > vim.diagnostic.severity.WARN, 'P1 to P3 pass: ' .. d.message)
    end
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
  { 'completion knows the place', function()
    vim.cmd 'edit!'
    local buffer = vim.api.nvim_get_current_buf()
    local line = replace(buffer, '^column K3', 'column K3 "Canopy post, corner" {', '    ho')
    vim.api.nvim_win_set_cursor(0, { line + 1, 6 })
    local result = request(buffer, 'textDocument/completion', vim.lsp.util.make_position_params())
    local words = vim.tbl_map(function(item)
      return item.abbr
    end, vim.lsp.util.text_document_completion_list_to_complete_items(result, 'ho'))
    expect('hold', vim.tbl_contains(words, 'hold'), true)
    expect('column', vim.tbl_contains(words, 'column'), false)
    vim.cmd 'edit!'
  end },
  { 'a fix is offered and applied', function()
    local buffer = vim.api.nvim_get_current_buf()
    wait('the mark of the unit', function()
      return vim.tbl_contains(diagnostics(buffer), '18:15 unknown-unit')
    end)
    vim.api.nvim_win_set_cursor(0, { 18, 14 })
    local offered = {}
    vim.ui.select = function(items, options, choose)
      for _, item in ipairs(items) do
        local title = options.format_item(item) -- more than one value
        table.insert(offered, title)
        if title == 'Write kN' then
          choose(item)
        end
      end
    end
    vim.lsp.buf.code_action()
    wait('the fix', function()
      return vim.api.nvim_buf_get_lines(buffer, 17, 18, true)[1] == '    load S 25 kN'
    end)
    expect('offered first', offered[1], 'Write kN')
  end },
  { 'a hover shows the verdicts of a member', function()
    vim.cmd 'write'
    open 'boathouse/gallery.kern'
    vim.api.nvim_win_set_cursor(0, { vim.fn.search '^column P4', 7 })
    vim.lsp.buf.hover()
    local text = wait('the hover', function()
      for _, window in ipairs(vim.api.nvim_list_wins()) do
        if vim.api.nvim_win_get_config(window).relative ~= '' then
          local lines = vim.api.nvim_buf_get_lines(vim.api.nvim_win_get_buf(window), 0, -1, true)
          vim.api.nvim_win_close(window, true)
          return table.concat(lines, '\n')
        end
      end
    end)
    assert(text:find 'fails', text)
    assert(text:find 'flexural%-buckling%-minor.*1%.18.*6%.3%.1', text)
  end },
  { 'a name is renamed in every file', function()
    vim.api.nvim_win_set_cursor(0, { vim.fn.search 'section  = prop', 16 })
    vim.lsp.buf.rename 'small_post'
    local steel = vim.fn.bufadd(project .. '/boathouse/steel.kern')
    wait('the names', function()
      return vim.fn.bufloaded(steel) == 1 and vim.api.nvim_buf_get_lines(steel, 0, -1, true)
        and table.concat(vim.api.nvim_buf_get_lines(steel, 0, -1, true), '\n'):find 'section small_post *= "SHS 90x90x5"'
    end)
    local here = table.concat(vim.api.nvim_buf_get_lines(0, 0, -1, true), '\n')
    assert(here:find 'section  = small_post' and not here:find '= prop', here)
    vim.cmd 'wall'
  end },
  { 'formatting gives the one layout', function()
    local buffer = vim.api.nvim_get_current_buf()
    local before = vim.api.nvim_buf_get_lines(buffer, 0, -1, true)
    vim.cmd [[silent! %s/^    /  /]]
    vim.cmd [[silent! %s/ *= / =/]]
    if vim.lsp.buf.format then
      vim.lsp.buf.format { timeout_ms = patience }
    else
      vim.lsp.buf.formatting_sync(nil, patience)
    end
    expect('lines', vim.api.nvim_buf_get_lines(buffer, 0, -1, true), before)
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
