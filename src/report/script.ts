/**
 * The page's script, as text: its hash stands in the content security policy, so it must be the same bytes however the
 * program was built. It lights up beds, shells and zones, filters, sorts, reads out, and saves figures; nothing on the
 * page depends on it.
 */
export const script = `'use strict';
(() => {
  const root = document.documentElement;
  const data = JSON.parse(document.getElementById('data').textContent);
  const reader = document.getElementById('reader');
  const all = (selector, within) => Array.from((within || document).querySelectorAll(selector));
  root.classList.add('js');

  // What belongs to which bed, shell and zone.
  const index = { b: new Map(), s: new Map(), z: new Map() };
  const put = (kind, key, node) => {
    const list = index[kind].get(key);
    if (list) list.push(node); else index[kind].set(key, [node]);
  };
  for (const node of all('main [data-b], .side [data-b]')) for (const key of node.dataset.b.split(' ')) put('b', key, node);
  for (const node of all('[data-s]')) put('s', node.dataset.s, node);
  for (const node of all('[data-z]')) put('z', node.dataset.z, node);
  const bedsOfZone = new Map();
  for (const [id, bed] of Object.entries(data.beds)) for (const zone of bed[1]) {
    if (!bedsOfZone.has(zone)) bedsOfZone.set(zone, []);
    bedsOfZone.get(zone).push(id);
  }

  // Lighting up.
  let lit = [];
  let held = null;
  const dark = () => {
    for (const node of lit) node.classList.remove('on', 'star');
    lit = [];
    root.classList.remove('lit');
    reader.hidden = true;
    for (const button of all('.zonekey[aria-pressed=true]')) button.setAttribute('aria-pressed', 'false');
  };
  const turnOn = (nodes, name) => { for (const node of nodes || []) { node.classList.add(name); lit.push(node); } };
  const light = (what) => {
    dark();
    if (!what) return;
    let words = '';
    if (what.z !== undefined && what.b === undefined) {
      turnOn(index.z.get(what.z), 'on');
      for (const bed of bedsOfZone.get(what.z) || []) turnOn(index.b.get(bed), 'on');
      for (const button of all('.zonekey')) button.setAttribute('aria-pressed', String(button.dataset.z === what.z));
      words = data.zones[what.z] || '';
    } else {
      for (const bed of (what.b || '').split(' ')) {
        const nodes = index.b.get(bed);
        turnOn(what.s === undefined ? nodes : (nodes || []).filter((node) => node.dataset.s === undefined || node.dataset.s === what.s), 'on');
        const entry = data.beds[bed];
        if (entry) words += (words ? '  |  ' : '') + entry[2];
      }
      if (what.s !== undefined) {
        turnOn(index.s.get(what.s), 'star');
        turnOn(index.s.get(what.s), 'on');
        if (data.shells[what.s]) words += ' · ' + data.shells[what.s][1];
      }
    }
    root.classList.add('lit');
    reader.textContent = words;
    reader.hidden = !words;
  };
  const read = (node) => {
    const at = node && node.closest ? node.closest('[data-b],[data-s],[data-z]') : null;
    if (!at || at.closest('.off')) return null;
    const { b, s, z } = at.dataset;
    return b !== undefined || s !== undefined ? { b, s } : { z };
  };
  const same = (a, b) => !!a && !!b && a.b === b.b && a.s === b.s && a.z === b.z;

  let last = null;
  document.addEventListener('mouseover', (event) => {
    const what = read(event.target);
    if (held || same(what, last) || (!what && !last)) return;
    last = what;
    light(what);
  });
  document.addEventListener('focusin', (event) => {
    const what = event.target.matches('a[data-b],a[data-s],.zonekey') ? read(event.target) : null;
    if (what && !held) light(last = what);
  });
  document.addEventListener('focusout', (event) => {
    if (!held && event.target.matches('a[data-b],a[data-s],.zonekey,.figbox')) light(last = null);
  });
  document.addEventListener('click', (event) => {
    if (event.target.closest('button:not(.zonekey),select,input,summary')) return;
    const what = read(event.target);
    const link = event.target.closest('a');
    if (!what) { if (held && !link) { held = null; light(last = null); } return; }
    held = same(what, held) && !link ? null : what;
    light(last = held || (event.target.closest('.zonekey') ? null : what));
  });

  // Arrow keys step through a figure.
  const steps = (box, kind) => {
    const seen = new Set();
    return all('[data-' + kind + ']', box).filter((node) => {
      const key = node.dataset[kind];
      if (seen.has(key) || node.closest('.off') || (kind === 'b' && key.includes(' '))) return false;
      seen.add(key);
      return true;
    });
  };
  const walk = new WeakMap();
  for (const box of all('.figbox')) {
    box.addEventListener('keydown', (event) => {
      const key = event.key;
      if (!['ArrowDown', 'ArrowUp', 'ArrowLeft', 'ArrowRight', 'Enter', ' '].includes(key)) return;
      if (key === 'Enter' || key === ' ') {
        const at = walk.get(box);
        if (!at) return;
        event.preventDefault();
        held = same(held, at) ? null : at;
        light(last = at);
        return;
      }
      const back = key === 'ArrowUp' || key === 'ArrowLeft';
      const at = walk.get(box);
      let list = steps(box, 'b');
      let next;
      if ((key === 'ArrowLeft' || key === 'ArrowRight') && at && at.b !== undefined) {
        const shells = steps(box, 's').filter((node) => node.dataset.b === at.b);
        if (shells.length) {
          const now = shells.findIndex((node) => node.dataset.s === at.s);
          next = shells[now < 0 ? (back ? shells.length - 1 : 0) : (now + (back ? -1 : 1) + shells.length) % shells.length];
        }
      }
      if (!next) {
        if (!list.length) list = steps(box, 'z');
        if (!list.length) return;
        const now = at ? list.findIndex((node) => node.dataset.b === at.b && (at.b !== undefined || node.dataset.z === at.z)) : -1;
        next = list[now < 0 ? (back ? list.length - 1 : 0) : (now + (back ? -1 : 1) + list.length) % list.length];
      }
      event.preventDefault();
      const { b, s, z } = next.dataset;
      const what = b === undefined ? { z } : key === 'ArrowUp' || key === 'ArrowDown' ? { b } : { b, s };
      walk.set(box, what);
      held = null;
      light(last = what);
      next.scrollIntoView({ block: 'nearest', inline: 'nearest' });
    });
  }
  document.addEventListener('keydown', (event) => {
    if (event.key !== 'Escape') return;
    held = null;
    light(last = null);
  });

  // Filters.
  const filters = document.querySelector('.filters');
  const wanted = () => Object.fromEntries(all('select', filters).map((select) => [select.dataset.filter, select.value]));
  const sift = () => {
    const want = wanted();
    const fits = new Map();
    let shown = 0;
    for (const [id, [section, zones]] of Object.entries(data.beds)) {
      const own = want.clock ? [zones[want.clock]] : zones;
      const fit = (!want.section || String(section) === want.section) && (want.clock ? !!own[0] : true) && (!want.zone || own.includes(want.zone));
      fits.set(id, fit);
      if (fit) shown++;
    }
    for (const [id, nodes] of index.b) for (const node of nodes) {
      if (node.closest('p') && !node.closest('table')) continue;
      node.classList.toggle('off', !node.dataset.b.split(' ').some((key) => fits.get(key)));
    }
    for (const node of all('tr[data-c]')) if (want.clock && node.dataset.c !== want.clock) node.classList.add('off'); else if (node.dataset.b === undefined) node.classList.remove('off');
    for (const node of all('tr[data-z]:not([data-b]), .tie')) {
      const other = (want.zone && node.dataset.z !== want.zone) || (want.clock && node.dataset.z.split('.')[0] !== want.clock);
      node.classList.toggle('off', !!other);
    }
    for (const figure of all('figure[data-c]')) figure.classList.toggle('off', !!want.clock && figure.dataset.c !== want.clock);
    const some = Object.values(want).some(Boolean);
    const total = Object.keys(data.beds).length;
    filters.querySelector('.count').textContent = some ? shown + ' of ' + total + ' beds shown' : total + ' beds';
  };
  if (filters) {
    filters.hidden = false;
    filters.addEventListener('change', sift);
    filters.addEventListener('submit', (event) => event.preventDefault());
    sift();
  }
  for (const hint of all('.hint')) hint.hidden = false;
  for (const button of all('.zonekey')) { button.disabled = false; button.setAttribute('aria-pressed', 'false'); }

  // Tables: sort by a column, find a word.
  const value = (cell) => {
    const text = cell.dataset.v !== undefined ? cell.dataset.v : cell.textContent.trim();
    const number = Number(text.replace('\\u2212', '-').replace(/^[<>] /, ''));
    return text === '' || text === '\\u2013' ? null : Number.isNaN(number) ? text.toLowerCase() : number;
  };
  const compare = (a, b) => {
    if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
    if (typeof a === typeof b && typeof a === 'number') return a - b;
    return String(a).localeCompare(String(b), 'en', { numeric: true });
  };
  for (const table of all('main table')) {
    const body = table.tBodies[0];
    const heads = all('thead th', table);
    heads.forEach((head, column) => {
      const button = document.createElement('button');
      button.type = 'button';
      button.textContent = head.textContent;
      head.textContent = '';
      head.append(button);
      button.addEventListener('click', () => {
        const down = head.getAttribute('aria-sort') === 'ascending';
        for (const other of heads) other.removeAttribute('aria-sort');
        head.setAttribute('aria-sort', down ? 'descending' : 'ascending');
        const rows = Array.from(body.rows).map((row) => [value(row.cells[column]), row]);
        rows.sort((a, b) => a[0] === null || b[0] === null ? compare(a[0], b[0]) : (down ? -1 : 1) * compare(a[0], b[0]));
        body.append(...rows.map((pair) => pair[1]));
      });
    });
    if (body.rows.length > 8) {
      const label = document.createElement('label');
      label.className = 'find';
      const input = document.createElement('input');
      input.type = 'search';
      label.append('Find in this table: ', input);
      table.parentNode.before(label);
      input.addEventListener('input', () => {
        const words = input.value.toLowerCase().split(/\\s+/).filter(Boolean);
        for (const row of body.rows) {
          const text = words.length ? row.textContent.toLowerCase() : '';
          row.classList.toggle('unfound', !words.every((word) => text.includes(word)));
        }
      });
    }
  }

  // Saving a figure: the drawing as it is in the results folder.
  for (const button of all('.save')) {
    button.hidden = false;
    button.addEventListener('click', () => {
      const copy = button.closest('figure').querySelector('svg').cloneNode(true);
      for (const node of all('.on,.off,.star', copy)) node.classList.remove('on', 'off', 'star');
      const link = document.createElement('a');
      link.href = URL.createObjectURL(new Blob([new XMLSerializer().serializeToString(copy)], { type: 'image/svg+xml' }));
      link.download = button.dataset.save + '.svg';
      link.click();
      setTimeout(() => URL.revokeObjectURL(link.href), 10000);
    });
  }

  // On paper the shorter tables stand open.
  let opened = [];
  addEventListener('beforeprint', () => {
    opened = all('details:not([open])').filter((folded) => all('tbody tr', folded).length <= 60);
    for (const folded of opened) folded.open = true;
  });
  addEventListener('afterprint', () => {
    for (const folded of opened) folded.open = false;
    opened = [];
  });

  // A link to a row in a folded table opens it.
  const unfold = () => {
    const target = location.hash.length > 1 ? document.getElementById(decodeURIComponent(location.hash.slice(1))) : null;
    const folded = target && target.closest('details');
    if (folded) { folded.open = true; target.scrollIntoView(); }
  };
  addEventListener('hashchange', unfold);
  unfold();
})();
`;
