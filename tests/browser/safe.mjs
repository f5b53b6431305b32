// Nothing runs, nothing loads, and words that try stay words.
import path from 'node:path';
import { pagesIn, short, url } from './tools.mjs';
import { report } from './sites.mjs';
import { every, most } from './kinds.mjs';

/** Opens pages and notes whatever the console or the network has to say. */
async function listen(context, files, finding, see = () => {}) {
  const tab = await context.newPage();
  let now = '';
  let heard = [];
  tab.on('console', (m) => heard.push(`console: ${m.text()}`));
  tab.on('pageerror', (e) => heard.push(`error: ${e.message}`));
  tab.on('dialog', (d) => { heard.push(`dialog: ${d.message()}`); d.dismiss(); });
  tab.on('request', (r) => { if (r.url() !== now && !r.url().startsWith('data:')) heard.push(`loads ${r.url()}`); });
  tab.on('popup', () => heard.push('opens a window'));
  for (const file of files) {
    heard = [];
    now = url(file);
    await tab.goto(now);
    await see(tab, file);
    finding.ask(heard.length === 0, `${short(file)}: ${heard.slice(0, 3).join('; ')}`);
  }
  await tab.close();
}

/** Console and network are silent on every page. */
export async function quiet(context, finding) {
  await listen(context, every(), finding);
}

/** The policy of the page is there, and Chromium keeps to it. */
export async function policy(context, finding) {
  const tab = await context.newPage();
  for (const file of most()) {
    await tab.goto(url(file));
    const said = await tab.evaluate(() => ({
      policy: document.querySelector('meta[http-equiv="Content-Security-Policy"]')?.content ?? '',
      first: document.head.querySelector('meta[http-equiv],style,title,link')?.httpEquiv ?? '',
      scripts: document.scripts.length,
      inline: document.querySelectorAll('[style]').length,
    }));
    finding.ask(said.policy.startsWith("default-src 'none'") && !/script|unsafe|http|\*/.test(said.policy), `${short(file)}: policy ${said.policy}`);
    finding.ask(said.first === 'Content-Security-Policy', `${short(file)}: something stands before the policy`);
    finding.ask(said.scripts === 0 && said.inline === 0, `${short(file)}: scripts or style attributes`);
  }
  // what the policy forbids does not happen: a script, a picture, a style, a form put in by force
  await tab.goto(url(every()[0]));
  const loads = [];
  tab.on('response', (r) => loads.push(r.url()));
  tab.on('requestfailed', (r) => { if (!/csp|BLOCKED/i.test(r.failure().errorText)) loads.push(`${r.url()} ${r.failure().errorText}`); });
  const ran = await tab.evaluate(async () => {
    const add = (tag, set) => document.body.append(Object.assign(document.createElement(tag), set));
    add('script', { textContent: 'window.ran = true' });
    add('img', { src: 'http://filmwright.invalid/p.png' });
    add('style', { textContent: 'body { --forced: 1 }' });
    add('iframe', { src: 'http://filmwright.invalid/' });
    await new Promise((done) => { setTimeout(done, 300); });
    return { ran: window.ran === true, styled: getComputedStyle(document.body).getPropertyValue('--forced') };
  });
  finding.ask(!ran.ran, 'a script put in by force ran');
  finding.ask(ran.styled === '', 'a style put in by force was applied');
  finding.ask(loads.length === 0, `loaded by force: ${loads.join(', ')}`);
  await tab.close();
}

const pieces = [
  '"', "'", '<', '>', '&', '`', '</style>', '</script>', '</title>', '</svg>', '</math>', ']]>', '<!--', '-->',
  '<script>window.owned=1</script>', '<img src=x onerror=window.owned=1>', '<svg onload=window.owned=1>',
  '"onmouseover="window.owned=1', "' autofocus onfocus='window.owned=1", 'javascript:window.owned=1',
  '<style>*{display:none}</style>', '<base href=http://filmwright.invalid/>', '<meta http-equiv=refresh content=0>',
  '{{ 7*7 }}', '{% if %}', '&#60;script&#62;', '&lt;', 'url(http://filmwright.invalid/)', '*/', '\\', '\\22', ';}', '${x}',
  'é', '漢', '\u2028', 'a b', '..', '/', '%3Cscript%3E', '<form action=http://filmwright.invalid/>', '=cmd', '|', '#',
];

/** Words of so many pieces, the same for the same seed. */
function words(seed) {
  let state = seed * 2654435761 % 2147483647;
  const next = (n) => { state = state * 48271 % 2147483647; return state % n; };
  return () => Array.from({ length: 2 + next(5) }, () => pieces[next(pieces.length)]).join('');
}

/** A site with words of a source in every place that takes any; `quote` keeps them YAML. */
function site(word) {
  const q = (text) => JSON.stringify(text).replace(/\u2028/g, '\\u2028');
  const note = () => word().replaceAll('"', "'").replaceAll('\\', '/').replaceAll('\u2028', ' ');
  const [area, tag, oil, other] = [word(), `M${word()}`, `O${word()}`, `P${word()}`].map((w) => w.trim() || 'x');
  return {
    'site.yaml': `file: site 1
site: ${q(word())}
client: ${q(word())}
document: ${q(word())}
revision: ${q(word())}
author: ${q(word())}
status: ${q(word())}
notes: ${q(`${word()}\n\n[x](javascript:window.owned=1) ![y](http://filmwright.invalid/y.png) <b onclick=window.owned=1>z</b> ${word()}`)}
areas:
  ${q(area)}:
    ambient: ${q(`-5 .. 35 degC, measured "${note()}"`)}
machines:
  ${q(tag)}:
    name: ${q(word())}
    area: ${q(area)}
    lubrication: splash
    oil now: ${q(oil)}
    sump rise: ${q(`40 K +/- 3 K, measured "${note()}"`)}
    start limit: ${q(`9000 mm2/s, maker "${note()}"`)}
    parts:
      - gear mesh: ${q(word())}
        pitch-line speed: ${q(`unknown (2 .. 4 m/s), ask "${note()}"`)}
`,
    'oils.yaml': `file: oils 1
${[oil, other].map((id, i) => `${q(id)}:
  name: ${q(word())}
  kind: gear
  base: mineral
  note: ${q(word())}
  source: ${q(word())}
  viscosity: [${220 + 100 * i} mm2/s at 40 degC, ${18.9 + 5 * i} mm2/s at 100 degC]
  pour point: -18 degC
`).join('')}`,
  };
}

/** Hostile words in every field, many times over: the page keeps the shape it has with tame ones. */
export async function hostile(context, finding) {
  for (let seed = 1; seed <= 8; seed += 1) {
    const name = `hostile-${seed}`;
    const bad = words(seed);
    report(name, site(bad), seed % 2 ? [] : ['--units', 'us']);
    await listen(context, pagesIn(name), finding, async (tab, file) => {
      const seen = await tab.evaluate(strange);
      finding.ask(seen.length === 0, `${short(file)}: ${seen.slice(0, 3).join('; ')}`);
      finding.ask(/^[a-zA-Z0-9_.-]+$/.test(path.basename(file)), `a file called ${path.basename(file)}`);
      for (const link of await tab.$$('a[href]')) {
        const href = await link.getAttribute('href');
        finding.ask(/^(#|[\w.-]+\.html(#|$)|https?:\/\/[\w.-]+|mailto:)/.test(href), `${short(file)}: leads to ${href}`);
      }
      await tab.mouse.move(200, 200);
      await tab.keyboard.press('Tab');
    });
  }
}

/** What no page of the program holds. */
function strange() {
  const found = [];
  if (window.owned) found.push('a script ran');
  const known = new Set(['svg', 'math']);
  for (const e of document.querySelectorAll('*')) {
    for (const a of e.attributes) if (/^on/i.test(a.name) || a.name === 'style' || a.name === 'autofocus') found.push(`${e.tagName} ${a.name}`);
    if (/^(script|iframe|object|embed|form|base|link|audio|video)$/i.test(e.tagName)) found.push(e.tagName);
    if (e.tagName === 'STYLE' && e.parentElement !== document.head) found.push('a style outside the head');
    if (e.tagName === 'IMG' && !e.src.startsWith('data:')) found.push(`a picture from ${e.src}`);
    if (e.tagName === 'B' && e.closest('.prose') && e.textContent === 'z') found.push('raw HTML of a note');
    known.delete(e.tagName);
  }
  if (document.querySelectorAll('head > style').length !== 1) found.push('not one style');
  if (document.querySelectorAll('main > article').length !== 1) found.push('not one sheet');
  if (document.body.lastElementChild?.tagName !== 'MAIN') found.push(`the body ends with ${document.body.lastElementChild?.tagName}`);
  if (getComputedStyle(document.querySelector('main')).display === 'none') found.push('the sheet is hidden');
  return found;
}
