/** The desk's own script: day and night, cells that take typing, checks as you type, jobs. */

const token = document.querySelector('meta[name="desk-token"]').content;

/** Sends form values; the desk answers in JSON. */
async function send(address, values) {
  const answer = await fetch(address, {
    method: 'POST',
    headers: { 'X-Desk-Token': token },
    body: new URLSearchParams(values),
  });
  return { status: answer.status, said: await answer.json() };
}

/** Waits until nothing has been asked for `ms`, then does the last thing asked. */
function settled(ms, work) {
  let timer;
  return (...given) => {
    clearTimeout(timer);
    timer = setTimeout(() => work(...given), ms);
  };
}

for (const button of document.querySelectorAll('[data-mode-switch]')) {
  button.addEventListener('click', () => {
    const mode = document.documentElement.dataset.mode === 'night' ? 'day' : 'night';
    document.documentElement.dataset.mode = mode;
    localStorage.setItem('desk-mode', mode);
  });
}

for (const input of document.querySelectorAll('[data-find]')) {
  const rows = document.getElementById(input.dataset.find).tBodies[0].rows;
  input.addEventListener('input', () => {
    const wanted = input.value.trim().toLowerCase();
    for (const row of rows) row.hidden = !row.textContent.toLowerCase().includes(wanted);
  });
}

/** Forms of one row: the problem stands beside the field as it is typed. */
for (const form of document.querySelectorAll('[data-values]')) {
  const look = settled(250, async (field) => {
    const given = field.closest('.given');
    const { said } = await send(form.action, [
      ['try', '1'],
      ['table', form.elements.table.value],
      ['key', given.querySelector('[name=key]').value],
      ['was', given.querySelector('[name=was]').value],
      ['text', field.value],
    ]);
    const wrong = said.refused?.[0];
    field.setAttribute('aria-invalid', wrong ? 'true' : 'false');
    field.closest('.entry').querySelector('output').textContent = wrong ? `${wrong.reason} ${wrong.fix}` : '';
  });
  form.addEventListener('input', (event) => {
    if (event.target.dataset.key) look(event.target);
  });
}

const grid = document.querySelector('[data-cells]');
if (grid) cells(grid);

/** A grid by keyboard: arrows move, typing changes, paste takes a block from a spreadsheet. */
function cells(table) {
  const changes = new Map();
  const save = document.querySelector('[data-save-cells]');
  const side = document.querySelector('[data-cell]');
  const say = (name, text) => {
    const place = side.querySelector(`[data-cell-${name}]`);
    if (place) place.textContent = text;
  };
  const cellAt = (row, column) => table.tBodies[0].rows[row]?.cells[column];
  const isCell = (cell) => cell?.dataset.key !== undefined;
  let at = table.querySelector('[data-key]');
  let typing = null;
  if (at) at.tabIndex = 0;

  const textOf = (cell) => changes.get(cell.dataset.key)?.text ?? cell.dataset.was;

  function show(cell) {
    const [first, ...rest] = textOf(cell).split(' ');
    const small = document.createElement('small');
    small.textContent = rest.join(' ');
    cell.replaceChildren(first, ' ', small); // the blank parts the figures for a reader's voice
  }

  function tell(cell) {
    side.hidden = false;
    say('plant', cell.parentElement.querySelector('th')?.textContent.trim() ?? '');
    say('zone', cell.dataset.zone ?? '');
    say('was', cell.dataset.was);
    say('now', textOf(cell));
    say('wrong', cell.dataset.wrong ?? '');
  }

  function move(cell) {
    if (!isCell(cell)) return;
    if (typing) keep();
    at.tabIndex = -1;
    at = cell;
    at.tabIndex = 0;
    at.focus();
    tell(at);
  }

  function count() {
    save.disabled = changes.size === 0;
    save.textContent = changes.size ? `${save.dataset.word}, ${changes.size}` : save.dataset.word;
  }

  const check = settled(200, async (cell) => {
    const change = changes.get(cell.dataset.key);
    if (!change) return;
    const { said } = await send(table.dataset.cells, [['try', '1'], ['table', table.dataset.table], ...pairs([change])]);
    refuse(cell, said.refused?.[0]);
    if (cell === at) tell(cell);
  });

  function refuse(cell, wrong) {
    cell.dataset.wrong = wrong ? `${wrong.reason} ${wrong.fix}` : '';
    cell.setAttribute('aria-invalid', wrong ? 'true' : 'false');
  }

  function put(cell, text) {
    const { key, was } = cell.dataset;
    const clean = text.trim().replace(/[\s/;]+/g, ' ');
    if (clean === was) changes.delete(key);
    else changes.set(key, { key, was, text: clean, cell });
    cell.toggleAttribute('data-changed', clean !== was);
    refuse(cell, undefined);
    show(cell);
    count();
    check(cell);
  }

  function type(first) {
    const input = document.createElement('input');
    input.value = first ?? textOf(at);
    input.setAttribute('aria-label', `${side.querySelector('[data-cell-plant]')?.textContent ?? ''} ${at.dataset.zone ?? ''}`);
    at.replaceChildren(input);
    input.focus();
    typing = input;
    input.addEventListener('blur', () => typing === input && keep());
    input.addEventListener('input', () => {
      changes.set(at.dataset.key, { key: at.dataset.key, was: at.dataset.was, text: input.value.trim(), cell: at });
      say('now', input.value);
      check(at);
    });
  }

  function keep() {
    const text = typing.value;
    typing = null;
    put(at, text);
  }

  function drop() {
    typing = null;
    changes.delete(at.dataset.key);
    put(at, at.dataset.was);
    at.focus();
  }

  table.addEventListener('focusin', (event) => {
    if (isCell(event.target) && event.target !== at) move(event.target);
    else if (event.target === at) tell(at);
  });
  table.addEventListener('dblclick', (event) => {
    const cell = event.target.closest('[data-key]');
    if (cell && !typing) {
      move(cell);
      type();
    }
  });
  table.addEventListener('click', (event) => {
    const cell = event.target.closest('[data-key]');
    if (cell && cell !== at) move(cell);
  });
  table.addEventListener('keydown', (event) => {
    const row = at.parentElement.sectionRowIndex;
    const column = at.cellIndex;
    const steps = { ArrowUp: [-1, 0], ArrowDown: [1, 0], ArrowLeft: [0, -1], ArrowRight: [0, 1] };
    if (typing) {
      if (event.key === 'Enter') {
        event.preventDefault();
        keep();
        move(cellAt(row + 1, column) ?? at);
      } else if (event.key === 'Escape') {
        event.preventDefault();
        drop();
      } else if (event.key === 'Tab') {
        keep();
      }
      return;
    }
    if (event.target !== at) return;
    if (steps[event.key]) {
      event.preventDefault();
      let [down, right] = steps[event.key];
      let next = row + down;
      while (down && cellAt(next, column)?.parentElement.hidden) next += down;
      move(cellAt(next, column + right));
    } else if (event.key === 'Enter' || event.key === 'F2') {
      event.preventDefault();
      type();
    } else if (event.key === 'Delete' || event.key === 'Backspace') {
      event.preventDefault();
      put(at, '');
    } else if (event.key.length === 1 && !event.ctrlKey && !event.metaKey && !event.altKey) {
      event.preventDefault();
      type(event.key);
    }
  });
  table.addEventListener('paste', (event) => {
    if (typing) return;
    event.preventDefault();
    const lines = event.clipboardData.getData('text/plain').replace(/\r/g, '').replace(/\n$/, '').split('\n');
    const row = at.parentElement.sectionRowIndex;
    lines.forEach((line, down) => line.split('\t').forEach((text, right) => {
      const cell = cellAt(row + down, at.cellIndex + right);
      if (isCell(cell)) put(cell, text);
    }));
  });

  save.dataset.word = save.textContent.trim();
  save.addEventListener('click', async () => {
    if (typing) keep();
    const asked = [...changes.values()];
    save.disabled = true;
    const { said } = await send(table.dataset.cells, [['table', table.dataset.table], ...pairs(asked)]);
    const refused = new Map((said.refused ?? []).map((wrong) => [wrong.key, wrong]));
    for (const { key, text, cell } of asked) {
      refuse(cell, refused.get(key));
      if (refused.has(key)) continue;
      changes.delete(key);
      cell.dataset.was = text;
      cell.removeAttribute('data-changed');
    }
    count();
    if (said.refused === undefined) say('wrong', said.said ?? said.refused ?? '');
    tell(at);
    problems(said.problems ?? []);
    const undo = document.querySelector('[data-undo] button');
    undo.disabled = !said.undo;
    undo.title = said.undo ?? '';
  });
  addEventListener('beforeunload', (event) => {
    if (changes.size) event.preventDefault();
  });
}

function pairs(changes) {
  return changes.flatMap(({ key, was, text }) => [['key', key], ['was', was], ['text', text]]);
}

/** The list in the margin after a save. */
function problems(list) {
  const place = document.querySelector('[data-problems]');
  place.replaceChildren(...list.map((problem) => {
    const item = document.createElement('li');
    const wrong = document.createElement('b');
    const small = document.createElement('small');
    wrong.textContent = problem.wrong;
    small.textContent = `${problem.place} ${problem.fix}`;
    item.append(wrong, document.createElement('br'), small);
    return item;
  }));
}

/** A job's page follows its work until it ends, then loads once more. */
const job = document.querySelector('[data-job]');
if (job) follow(job);

async function follow(place) {
  const answer = await fetch(place.dataset.job);
  const now = await answer.json();
  place.querySelector('[data-job-step]').textContent = now.said;
  place.querySelector('[data-job-lines]').textContent = now.lines;
  place.querySelector('rect').setAttribute('width', now.width);
  if (now.running) setTimeout(() => follow(place), 700);
  else location.reload();
}
