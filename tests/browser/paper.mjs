// Print: PDF on A4 and Letter, read back with Poppler.
import { execFileSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { axeSource, page, papers, short, url } from './tools.mjs';
import { kinds, ofStates } from './kinds.mjs';
import { states } from './sites.mjs';

const sizes = { A4: [595.3, 841.9], Letter: [612, 792] };
/** The side margin of the page, points: 11 mm. */
const margin = 11 / 25.4 * 72;

const run = (command, ...args) => execFileSync(command, args, { encoding: 'utf8', maxBuffer: 1 << 28 });

/** Words with their boxes, page by page. */
function boxes(pdf) {
  return run('pdftotext', '-bbox', pdf, '-').split('<page ').slice(1).map((part) => {
    const [, width, height] = part.match(/width="([\d.]+)" height="([\d.]+)"/);
    const words = [...part.matchAll(/<word xMin="([\d.-]+)" yMin="([\d.-]+)" xMax="([\d.-]+)" yMax="([\d.-]+)">([^<]*)</g)]
      .map((m) => ({ left: +m[1], top: +m[2], right: +m[3], bottom: +m[4], text: m[5] }));
    return { width: +width, height: +height, words };
  });
}

// in the order of the page and in that of its lines: words in columns stand together in one of them
const text = (pdf, ...more) => run('pdftotext', ...more, pdf, '-') + run('pdftotext', '-layout', ...more, pdf, '-');
// names broken at a dash lose it when the text is taken out of the page
const squeeze = (t) => t.replace(/[\s\u202f\u00a0\u00ad\u2010-]+/g, '');

/** Puts marks of one pixel into heads, rows and figures, to find on paper where each begins and ends. */
function plant() {
  let n = 0;
  const mark = (into, first, word) => {
    // at the end a block of its own, so that it stands below all else at the left of its cell
    const e = document.createElement(first ? 'span' : 'div');
    e.style.textAlign = 'left';
    e.textContent = word;
    e.style.fontSize = '1px';
    e.style.lineHeight = '0';
    e.style.whiteSpace = 'nowrap';
    if (first) into.prepend(e); else into.append(e);
  };
  const made = { tables: [], figures: [] };
  for (const table of document.querySelectorAll('table')) {
    if (!table.tHead || table.closest('.prose') || table.caption?.classList.contains('xt')) continue;
    n += 1;
    mark(table.tHead.rows[0].cells[0], true, `qh${n}q`);
    let r = 0;
    for (const body of table.tBodies) {
      for (const row of body.rows) {
        r += 1;
        mark(row.cells[0], true, `qa${n}x${r}q`);
        mark(row.cells[row.cells.length - 1], false, `qb${n}x${r}q`);
      }
    }
    made.tables.push({ n, rows: r, name: (table.caption?.textContent ?? '').slice(0, 50) });
  }
  for (const svg of document.querySelectorAll('figure svg.fig-svg, .panels svg')) {
    n += 1;
    const box = svg.viewBox.baseVal;
    for (const [word, y] of [[`qf${n}q`, box.y + 2], [`qg${n}q`, box.y + box.height - 1]]) {
      const t = document.createElementNS('http://www.w3.org/2000/svg', 'text');
      t.textContent = word;
      t.setAttribute('x', box.x);
      t.setAttribute('y', y);
      t.style.fontSize = '2px';
      svg.append(t);
    }
    made.figures.push({ n, name: svg.querySelector('title')?.textContent ?? '' });
  }
  return made;
}

/** What the sheet says that its paper must hold. */
function said() {
  // words for those who cannot see a mark stand for the mark, which is printed
  const seen = (e) => { const copy = e.cloneNode(true); copy.querySelectorAll('.sr').forEach((s) => s.remove()); return copy.textContent.trim(); };
  const t = (s) => [...document.querySelectorAll(s)].map(seen).filter(Boolean);
  const governing = [...document.querySelectorAll('tr.pick td[data-l="Limit"] b')].map((e) => e.textContent.trim());
  const margins = [...document.querySelectorAll('tr.pick td[data-l="Margins"] text.t-dim')].map((e) => e.textContent);
  const results = [...document.querySelectorAll('.calc .gov .r b')].map((e) => e.textContent.trim());
  return {
    answer: t('.lead'), caution: t('.caution dd'), governing, margins, results,
    first: t('.first li'), register: t('.parts tbody th .tag'), key: t('.key-row li'), sections: t('section.sec > header > h2'),
    document: document.querySelector('.tb').textContent,
  };
}

export async function paper(context, finding) {
  const tab = await context.newPage();
  const jobs = [
    ...kinds().map(([, file]) => [file, 'A4']),
    ...ofStates(states).map((file) => [file, /imperial/.test(file) ? 'Letter' : 'A4']),
    ...['index.html', 'machine-M04.html', 'machine-M02.html', 'machine-M12.html', 'methods.html', 'rules.html', 'words.html'].map((f) => [page('demo-us', f), 'Letter']),
    [page('one-file', 'review.html'), 'A4'],
  ];
  for (const [file, size] of jobs) {
    const where = `${short(file)} ${size}`;
    const name = short(file).replace(/[/.]/g, '-');
    await tab.goto(url(file));
    const facts = await tab.evaluate(said);
    const pdf = path.join(papers, `${name}-${size}.pdf`);
    writeFileSync(pdf, await tab.pdf({ preferCSSPageSize: true, printBackground: true }));
    whole(finding, where, pdf, size, facts, /one-file/.test(file));
    if (/index/.test(file) && !/large/.test(file)) summary(finding, where, pdf, facts);
    if (/one-file/.test(file)) continue;
    const made = await tab.evaluate(plant);
    const planted = path.join(papers, `${name}-${size}.planted.pdf`);
    writeFileSync(planted, await tab.pdf({ preferCSSPageSize: true }));
    unbroken(finding, where, planted, made);
  }
  await legible(tab, finding);
  await tab.close();
}

/** Size, foot, nothing beyond the margins, and the words that decide. */
function whole(finding, where, pdf, size, facts, bundle) {
  const pages = boxes(pdf);
  const [width, height] = sizes[size];
  pages.forEach((p, i) => {
    finding.ask(Math.abs(p.width - width) < 1.5 && Math.abs(p.height - height) < 1.5, `${where}: page ${i + 1} is ${p.width} by ${p.height} pt`);
    for (const w of p.words) {
      if (w.text === '') continue;
      finding.ask(w.left >= margin - 2 && w.right <= p.width - margin + 2, `${where}: page ${i + 1}: "${w.text}" is at the edge: ${w.left} to ${w.right}`);
    }
    const foot = p.words.filter((w) => w.top > p.height - 16 / 25.4 * 72).map((w) => w.text).join(' ');
    finding.ask(foot.includes(`page ${i + 1} of ${pages.length}`), `${where}: no page number in the foot: ${foot}`);
    const number = facts.document.match(/Document\s*(\S+?)\s*Revision\s*(\S+?)\s*Sheet/);
    if (number && number[1] !== 'not') finding.ask(foot.includes(number[1]) && foot.includes(`rev ${number[2]}`), `${where}: no document and revision in the foot: ${foot}`);
  });
  if (bundle) return;
  const all = squeeze(text(pdf));
  for (const [what, list] of Object.entries({ answer: facts.answer, governing: facts.governing, margins: facts.margins, results: facts.results })) {
    for (const words of list) finding.ask(all.includes(squeeze(words)), `${where}: ${what} "${words}" is not on the paper`);
  }
  // set in lines, words of one sentence may stand beside others: each word is asked for
  const loose = new Set(text(pdf).split(/\s+/));
  for (const words of facts.caution) {
    const lost = words.split(/\s+/).filter((w) => !loose.has(w) && !all.includes(squeeze(w)));
    finding.ask(lost.length === 0, `${where}: of the caution is missing: ${lost.join(' ')}`);
  }
}

/** The first page of the overview holds all of its summary, and only that. */
function summary(finding, where, pdf, facts) {
  const first = squeeze(text(pdf, '-f', '1', '-l', '1'));
  const second = squeeze(text(pdf, '-f', '2', '-l', '2'));
  for (const words of [...facts.answer, ...facts.register, ...facts.key]) finding.ask(first.includes(squeeze(words)), `${where}: "${words}" is not on the first page`);
  for (const line of facts.first) {
    for (const w of line.split(/\s+/)) finding.ask(first.includes(squeeze(w)), `${where}: "${w}" of what to do first is not on the first page`);
  }
  const [, next] = facts.sections;
  if (next) finding.ask(second.includes(squeeze(next)), `${where}: "${next}" does not open the second page`);
}

/** Heads stand on every page of their table, no row and no figure is cut. */
function unbroken(finding, where, pdf, made) {
  const on = new Map();
  boxes(pdf).forEach((p, i) => {
    for (const m of p.words.map((w) => w.text).join(' ').matchAll(/q[habfg]\d+(?:x\d+)?q/g)) {
      if (!on.has(m[0])) on.set(m[0], new Set());
      on.get(m[0]).add(i + 1);
    }
  });
  const pagesOf = (word) => [...(on.get(word) ?? [])];
  for (const table of made.tables) {
    const heads = pagesOf(`qh${table.n}q`);
    for (let r = 1; r <= table.rows; r += 1) {
      const [begins] = pagesOf(`qa${table.n}x${r}q`);
      const [ends] = pagesOf(`qb${table.n}x${r}q`);
      finding.ask(begins !== undefined && begins === ends, `${where}: ${table.name}: row ${r} begins on page ${begins}, ends on ${ends}`);
      finding.ask(begins === undefined || heads.includes(begins), `${where}: ${table.name}: no head on page ${begins} (heads on ${heads})`);
    }
  }
  for (const figure of made.figures) {
    const [top] = pagesOf(`qf${figure.n}q`);
    const [bottom] = pagesOf(`qg${figure.n}q`);
    finding.ask(top !== undefined && top === bottom, `${where}: figure ${figure.name} begins on page ${top}, ends on ${bottom}`);
  }
}

/** Printed without colour the words keep their contrast. */
async function legible(tab, finding) {
  for (const file of [page('demo', 'index.html'), page('demo', 'machine-M04.html')]) {
    await tab.goto(url(file));
    await tab.emulateMedia({ media: 'print', colorScheme: 'light' });
    await tab.evaluate(() => { document.documentElement.style.filter = 'grayscale(1)'; });
    await tab.evaluate(axeSource);
    const result = await tab.evaluate(() => globalThis.axe.run(document, { runOnly: ['color-contrast'] }));
    finding.look(result.passes.length);
    for (const v of result.violations) finding.faults.push(`${short(file)} in print: ${v.nodes[0].target} ${v.nodes[0].any[0]?.message}`);
    const grey = await tab.evaluate(() => [...new Set([...document.querySelectorAll('main *')].filter((e) => [...e.childNodes].some((n) => n.nodeType === 3 && n.textContent.trim() !== '')).map((e) => getComputedStyle(e).color))]
      .map((c) => c.match(/[\d.]+/g).map(Number)).map(([r, g, b]) => ({ r, g, b })));
    for (const { r, g, b } of grey) {
      const part = (v) => (v / 255 <= 0.03928 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4);
      const light = 0.2126 * part(r) + 0.7152 * part(g) + 0.0722 * part(b);
      finding.ask(1.05 / (light + 0.05) >= 4.5 || (r > 250 && g > 250), `${short(file)}: a word of grey ${r},${g},${b} on white`);
    }
    await tab.emulateMedia({ media: 'screen' });
  }
}
