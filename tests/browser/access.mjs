// Accessibility: axe-core, the keyboard, landmarks and tables, narrow windows and large letters.
import { axeSource, short, url } from './tools.mjs';
import { kinds, ofStates } from './kinds.mjs';
import { states } from './sites.mjs';

const widths = [360, 768, 1300];

async function axeOn(tab, where, finding) {
  const result = await tab.evaluate(() => globalThis.axe.run(document, { resultTypes: ['violations'] }));
  finding.look(result.passes.length);
  for (const v of result.violations) {
    for (const node of v.nodes.slice(0, 3)) {
      finding.faults.push(`${where}: ${v.id}: ${node.target.join(' ')}: ${(node.any[0] ?? node.all[0] ?? node.none[0])?.message ?? v.help}`);
    }
  }
}

/** No violation of axe-core on any kind of page, light and dark, at three widths. */
export async function accessible(context, finding) {
  const jobs = [
    ...kinds().map(([, file]) => ({ file, schemes: ['light', 'dark'], at: widths })),
    ...ofStates(states).map((file) => ({ file, schemes: ['light'], at: [1300] })),
  ];
  const worker = async () => {
    const tab = await context.newPage();
    for (let job = jobs.shift(); job; job = jobs.shift()) {
      await tab.goto(url(job.file));
      await tab.evaluate(axeSource);
      for (const colorScheme of job.schemes) {
        for (const width of job.at) {
          await tab.emulateMedia({ colorScheme });
          await tab.setViewportSize({ width, height: 900 });
          await axeOn(tab, `${short(job.file)} ${colorScheme} ${width} px`, finding);
        }
      }
    }
    await tab.close();
  };
  await Promise.all([worker(), worker()]);
}

/** Tab goes through the page in its order, each stop is seen, landmarks and tables are named. */
export async function keyboard(context, finding) {
  const tab = await context.newPage();
  for (const [, file] of kinds()) {
    const where = short(file);
    await tab.goto(url(file));
    await tab.setViewportSize({ width: 1300, height: 900 });
    const page = await tab.evaluate(structure);
    for (const fault of page.faults) finding.faults.push(`${where}: ${fault}`);
    finding.look(page.looked);
    await tab.keyboard.press('Tab');
    const skip = await tab.evaluate(() => {
      const e = document.activeElement;
      const r = e.getBoundingClientRect();
      return { is: e.className === 'skip', seen: r.left >= 0 && r.top >= 0 && r.width > 20, to: e.getAttribute('href') };
    });
    finding.ask(skip.is && skip.seen, `${where}: the first stop is not the link to the sheet, in view`);
    await tab.keyboard.press('Enter');
    finding.ask(await tab.evaluate((to) => location.hash === to, skip.to), `${where}: the skip link leads nowhere`);
    await tab.goto(url(file));
    const stops = Math.min(page.stops, 60);
    let before = -1;
    for (let i = 0; i < stops; i += 1) {
      await tab.keyboard.press('Tab');
      const stop = await tab.evaluate(stopHere);
      if (!stop) break;
      finding.ask(stop.place > before, `${where}: stop ${i + 1} (${stop.what}) goes back in the page`);
      finding.ask(stop.ring, `${where}: no ring round ${stop.what}`);
      before = stop.place;
    }
  }
  await tab.close();
}

function stopHere() {
  const e = document.activeElement;
  if (!e || e === document.body) return null;
  const style = getComputedStyle(e);
  return {
    place: [...document.querySelectorAll('*')].indexOf(e),
    what: `${e.tagName.toLowerCase()} ${(e.getAttribute('aria-label') ?? e.textContent).trim().slice(0, 40)}`,
    ring: style.outlineStyle !== 'none' && parseFloat(style.outlineWidth) >= 2,
  };
}

function structure() {
  const faults = [];
  let looked = 0;
  const ask = (sound, words) => { looked += 1; if (!sound) faults.push(words); };
  const all = (s) => [...document.querySelectorAll(s)];
  const name = (e) => e.getAttribute('aria-label') ?? (e.getAttribute('aria-labelledby') ?? '').split(' ')
    .map((id) => document.getElementById(id)?.textContent ?? '').join(' ').trim();
  ask(all('main').length === 1, 'not one main');
  ask(all('h1').length === 1, 'not one main heading');
  ask(document.documentElement.lang === 'en', 'no language');
  ask(document.title.trim() !== '', 'no title');
  let level = 1;
  for (const h of all('h1,h2,h3,h4,h5,h6')) {
    const now = Number(h.tagName[1]);
    ask(now <= level + 1, `heading ${h.textContent} jumps from ${level} to ${now}`);
    level = now;
  }
  for (const list of ['nav', 'section']) {
    const names = all(list).map(name);
    for (const n of names) ask(n !== '', `a ${list} without a name`);
    for (const n of new Set(names)) ask(names.filter((x) => x === n).length === 1, `several ${list}s called ${n}`);
  }
  for (const t of all('table')) {
    ask(t.closest('.prose') || (t.caption && t.caption.textContent.trim() !== ''), 'a table without a caption');
    for (const th of t.querySelectorAll('th')) ask(th.closest('.prose') || th.scope !== '', `no scope on the heading ${th.textContent.trim().slice(0, 30)}`);
  }
  for (const svg of all('svg')) {
    const hidden = svg.closest('[aria-hidden="true"]');
    ask(hidden || (svg.getAttribute('role') === 'img' && name(svg).length > 20), 'a figure without words');
  }
  for (const mini of all('svg.mini')) {
    const cell = mini.closest('td,th,figure,div');
    ask(cell.textContent.replace(/\s+/g, '') !== '', 'a small figure without words beside it');
  }
  const stops = all('a[href],input,[tabindex="0"]').length;
  return { faults, looked, stops };
}

/** Nothing is lost or pushed out of the window when it is narrow or the letters are large. */
export async function reflow(context, finding) {
  const tab = await context.newPage();
  const files = [...kinds().map(([, f]) => f), ...ofStates(states)];
  for (const file of files) {
    await tab.goto(url(file));
    await tab.setViewportSize({ width: 1300, height: 900 });
    const wide = await tab.evaluate(lookForLoss);
    // half the width is what a window shows at 200 %; 320 px is 1280 px at 400 % (WCAG 2.2, 1.4.10)
    for (const width of [320, 360, 650, 768, 1024]) {
      await tab.setViewportSize({ width, height: 900 });
      const seen = await tab.evaluate(lookForLoss);
      finding.ask(seen.over <= 0, `${short(file)} ${width} px: ${seen.over} px wider than the window: ${seen.widest}`);
      for (const lost of seen.lost) finding.faults.push(`${short(file)} ${width} px: out of the window: ${lost}`);
      finding.ask(seen.words === wide.words, `${short(file)} ${width} px: ${seen.words} words of ${wide.words} are there`);
    }
  }
  await tab.close();
}

function lookForLoss() {
  const root = document.documentElement;
  const lost = [];
  let words = 0;
  let widest = '';
  let most = 0;
  const walk = document.createTreeWalker(document.querySelector('main'), NodeFilter.SHOW_TEXT);
  for (let node = walk.nextNode(); node; node = walk.nextNode()) {
    const text = node.textContent.trim();
    const on = node.parentElement;
    if (text === '' || on.closest('.sr, svg, math')) continue;
    words += text.split(/\s+/).length;
    const range = document.createRange();
    range.selectNodeContents(node);
    const box = range.getBoundingClientRect();
    if (box.right > most) { most = box.right; widest = text.slice(0, 50); }
    if (on.closest('.scroll, .f, thead')) continue;
    if (box.width > 0 && (box.right > root.clientWidth + 1 || box.left < -1)) lost.push(text.slice(0, 60));
  }
  return { over: root.scrollWidth - root.clientWidth, lost: lost.slice(0, 3), words, widest };
}
