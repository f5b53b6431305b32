// Figures: no label on another, and the numbers of the drawings are those of the tables.
import { short, url } from './tools.mjs';
import { every, kinds, most } from './kinds.mjs';

/** No label lies on another or leaves its figure, as Chromium sets them, on screen and on paper. */
export async function labels(context, finding) {
  const tab = await context.newPage();
  const files = [...new Set([...kinds().map(([, f]) => f), ...most().filter((f) => /machine-|oil-/.test(f))])];
  for (const file of files) {
    await tab.goto(url(file));
    for (const media of ['screen', 'print']) {
      await tab.emulateMedia({ media });
      const seen = await tab.evaluate(crowded);
      finding.look(seen.labels);
      for (const fault of seen.faults) finding.faults.push(`${short(file)} ${media}: ${fault}`);
    }
    await tab.emulateMedia({ media: 'screen' });
  }
  await tab.close();
}

function crowded() {
  const faults = [];
  let labels = 0;
  for (const svg of document.querySelectorAll('svg:not(.mk):not(.defs)')) {
    const frame = svg.getBoundingClientRect();
    const boxes = [...svg.querySelectorAll('text')].filter((t) => t.textContent.trim() !== '').map((t) => {
      const r = t.getBoundingClientRect();
      // the box of a line holds its leading; the letters themselves stand in the middle three quarters
      const cut = r.height * 0.15;
      return { words: t.textContent, own: t.closest('g'), left: r.left, right: r.right, top: r.top + cut, bottom: r.bottom - cut, ball: t.classList.contains('t-bal') };
    });
    labels += boxes.length;
    const name = svg.querySelector('title')?.textContent ?? 'a small figure';
    boxes.forEach((a, i) => {
      if (a.left < frame.left - 1.5 || a.right > frame.right + 1.5 || a.top < frame.top - 1.5 || a.bottom > frame.bottom + 1.5) {
        faults.push(`${name}: "${a.words}" leaves the figure`);
      }
      for (const b of boxes.slice(i + 1)) {
        const w = Math.min(a.right, b.right) - Math.max(a.left, b.left);
        const h = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top);
        if (w > 0.5 && h > 0.5) faults.push(`${name}: "${a.words}" and "${b.words}" share ${w.toFixed(1)} by ${h.toFixed(1)} px`);
      }
    });
  }
  return { labels, faults };
}

/** Every number read back from a drawing with its own ticks is the number printed beside it. */
export async function numbers(context, finding) {
  const tab = await context.newPage();
  for (const file of every().filter((f) => /machine-|index|area-/.test(f) && !/one-file|models/.test(f))) {
    await tab.goto(url(file));
    const seen = await tab.evaluate(readBack);
    finding.look(seen.read);
    for (const fault of seen.faults) finding.faults.push(`${short(file)}: ${fault}`);
  }
  finding.ask(finding.looked > 1200, `only ${finding.looked} numbers were read back`);
  await tab.close();
}

function readBack() {
  const faults = [];
  let read = 0;
  const num = (text) => Number(text.replaceAll('\u2212', '-').replaceAll('\u202f', '').replace('+', ''));
  const at = (e, name) => Number(e.getAttribute(name));
  const ask = (sound, words) => { read += 1; if (!sound) faults.push(words); };
  const marks = (svg, anchor) => [...svg.querySelectorAll('text.t-tick')]
    .filter((t) => getComputedStyle(t).textAnchor === anchor && Number.isFinite(num(t.textContent)))
    .map((t) => ({ value: num(t.textContent), x: at(t, 'x'), y: at(t, 'y') - 4.2 }));
  const printed = (text) => [...text.matchAll(/(hot|cold|grade|start|pour)\s+([+\u2212]\d+\.\d+)/g)].map((m) => m[2]);

  // margin bars: figures against words, lengths against figures
  for (const table of document.querySelectorAll('table.oils')) {
    const rows = [...table.tBodies[0].rows];
    const minis = rows.map((r) => r.querySelector('svg.mini')).filter(Boolean);
    const last = minis.at(-1);
    const scale = last && marks(last, 'middle').find((m) => m.value !== 0);
    const reach = last && Math.max(...marks(last, 'middle').map((m) => Math.abs(m.value)));
    rows.forEach((row) => {
      const svg = row.querySelector('svg.mini');
      if (!svg) return;
      const words = row.querySelector('td[data-l="Margins"] .sr').textContent;
      const shown = [...svg.querySelectorAll('text.t-dim')].map((t) => t.textContent);
      ask(printed(words).join() === shown.filter((s) => /\d/.test(s)).join(), `margins drawn ${shown} and said ${words}`);
      const zero = at(svg.querySelector('.limit'), 'x1');
      const bars = [...svg.querySelectorAll('.bar')];
      if (!scale || bars.length !== shown.length) return;
      const tickZero = at(last.querySelector('.limit'), 'x1');
      const perStep = (scale.x - tickZero) / scale.value;
      bars.forEach((bar, i) => {
        const left = at(bar, 'x');
        const right = left + at(bar, 'width');
        const length = (Math.abs(right - zero) > Math.abs(left - zero) ? right - zero : left - zero) / perStep;
        const said = num(shown[i]);
        // a bar longer than the axis ends with it
        const cut = Math.abs(length) >= reach - 0.01 && Math.abs(said) >= reach - 0.02;
        ask(cut || (said <= length + 0.011 && length - said < 0.02), `a bar of ${length.toFixed(3)} steps is called ${shown[i]}`);
      });
    });
  }

  // ambient bands: ends of bars against their figures, rounded inwards
  for (const svg of document.querySelectorAll('svg[id$="fig-bands"], figure[id$="fig-bands"] svg')) {
    const ticks = marks(svg, 'middle').filter((t) => t.y < 40 || t.y > 0);
    const axis = ticks.filter((t) => Math.abs(t.y - ticks[0].y) < 1);
    const value = (x) => axis[0].value + (x - axis[0].x) * (axis.at(-1).value - axis[0].value) / (axis.at(-1).x - axis[0].x);
    const figures = [...svg.querySelectorAll('text')].filter((t) => !axis.some((a) => a.x === at(t, 'x')))
      .map((t) => ({ text: t.textContent, value: num(t.textContent), x: at(t, 'x'), y: at(t, 'y') })).filter((f) => Number.isFinite(f.value));
    for (const bar of svg.querySelectorAll('rect.bar')) {
      const middle = at(bar, 'y') + at(bar, 'height') / 2;
      const beside = figures.filter((f) => Math.abs(f.y - 4.2 - middle) < at(bar, 'height'));
      const [low, high] = [value(at(bar, 'x')), value(at(bar, 'x') + at(bar, 'width'))];
      for (const f of beside) {
        const near = Math.abs(f.value - low) < Math.abs(f.value - high) ? low : high;
        ask(near === low ? f.value >= low - 0.15 && f.value < low + 1.15 : f.value <= high + 0.15 && f.value > high - 1.15, `a band from ${low.toFixed(2)} to ${high.toFixed(2)} is marked ${f.text}`);
      }
    }
  }

  // small bands of the overview against their words
  for (const table of document.querySelectorAll('table.wide')) {
    const head = table.tHead.querySelector('svg.mini');
    const axis = head ? marks(head, 'middle') : [];
    if (axis.length < 2) continue;
    const value = (x) => axis[0].value + (x - axis[0].x) * (axis.at(-1).value - axis[0].value) / (axis.at(-1).x - axis[0].x);
    for (const row of table.tBodies[0].rows) {
      const svg = row.querySelector('td svg.mini');
      const words = row.querySelector('td[data-l="Ambient"] .sr')?.textContent ?? '';
      const needed = words.match(/needed ([\u2212\d]+) to ([\u2212\d]+)/);
      if (!svg || !needed) continue;
      const lines = [...svg.querySelector('.need').getAttribute('d').matchAll(/M([\d.]+)/g)].map((m) => value(Number(m[1])));
      ask(Math.abs(lines[0] - num(needed[1])) < 1.1 && Math.abs(lines[1] - num(needed[2])) < 1.1, `uprights at ${lines.map((v) => v.toFixed(1))}, said ${needed[0]}`);
    }
  }

  // enlarged views: the dimension is the margin of the row proposed
  for (const detail of document.querySelectorAll('figure[id$="-h"] svg, figure[id$="-k"] svg')) {
    const dim = [...detail.querySelectorAll('text.t-dim')].map((t) => t.textContent.match(/([+\u2212]\d+\.\d+) step/)?.[1]).filter(Boolean);
    const key = detail.closest('figure').id.replace(/-fig-[hk]$/, '');
    const tables = [...document.querySelectorAll('table.oils')].filter((t) => t.closest('section.sec').id.startsWith(key.replace(/-p1$/, '')));
    const all = tables.flatMap((t) => [...t.querySelectorAll('td[data-l="Margins"] .sr')]).map((s) => s.textContent).join(' ');
    for (const d of dim) ask(all.includes(d), `a dimension of ${d} that no row has`);
  }

  // the curves: viscosity at the hot temperature of the table, read with a ruler
  const stretch = (nu) => Math.log10(Math.log10(nu + 0.7));
  for (const table of document.querySelectorAll('table.oils')) {
    const head = table.tHead.rows[0].cells[3].textContent.match(/mm²\/s, ([\u2212\d.]+)\u202f°(C|F)/);
    const section = table.closest('section.sec');
    const figure = section && document.getElementById(section.id.replace(/-oils$/, section.id.includes('-p') ? '-fig-curves' : '-p1-fig-curves'));
    if (!head || !figure) continue;
    const svg = figure.querySelector('svg');
    const kelvin = (t) => Math.log10((head[2] === 'F' ? (t - 32) / 1.8 : t) + 273.15);
    const ys = marks(svg, 'end');
    const xs = marks(svg, 'middle');
    if (ys.length < 2 || xs.length < 2) continue;
    const px = (t) => xs[0].x + (kelvin(t) - kelvin(xs[0].value)) * (xs.at(-1).x - xs[0].x) / (kelvin(xs.at(-1).value) - kelvin(xs[0].value));
    const nu = (y) => {
      const s = stretch(ys[0].value) + (y - ys[0].y) * (stretch(ys.at(-1).value) - stretch(ys[0].value)) / (ys.at(-1).y - ys[0].y);
      return 10 ** (10 ** s) - 0.7;
    };
    const x = px(num(head[1]));
    for (const row of table.tBodies[0].rows) {
      const letter = row.querySelector('.bln')?.textContent;
      const group = svg.querySelector(`g[data-item="${letter}"]`);
      const said = num(row.cells[3].textContent);
      if (!group || !Number.isFinite(said)) continue;
      const hit = [...group.querySelectorAll('polyline:not(.ln-new)')].flatMap((line) => {
        const points = line.getAttribute('points').split(' ').map((p) => p.split(',').map(Number));
        return points.slice(1).flatMap(([bx, by], i) => {
          const [ax, ay] = points[i];
          return ax <= x && x <= bx && bx > ax ? [nu(ay + (by - ay) * (x - ax) / (bx - ax))] : [];
        });
      });
      if (hit.length) ask(hit.some((v) => Math.abs(v / said - 1) < 0.03), `${letter} is drawn at ${hit.map((v) => v.toFixed(2))} mm²/s and printed ${said}`);
    }
  }
  return { read, faults };
}
