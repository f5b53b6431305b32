// Marks without colour, forced colours, and the screenshots that are kept.
import path from 'node:path';
import { axeSource, page, shots, short, url } from './tools.mjs';
import { kinds, ofStates } from './kinds.mjs';
import { states } from './sites.mjs';

const words = ['holds', 'tight', 'fails', 'open'];

/** The four marks keep apart by shape: seen in grey, with each colour vision, on paper and at night. */
export async function marks(context, finding) {
  const tab = await context.newPage();
  const lens = await context.newPage();
  const session = await context.newCDPSession(tab);
  const seen = [];
  for (const colorScheme of ['light', 'dark']) {
    for (const type of ['none', 'achromatopsia', 'deuteranopia', 'protanopia', 'tritanopia']) {
      await tab.emulateMedia({ colorScheme });
      await tab.goto(url(page('demo', 'words.html')));
      await session.send('Emulation.setEmulatedVisionDeficiency', { type });
      await tab.bringToFront();
      for (const word of words) {
        const png = await tab.locator(`.words .vd-${word} .mk`).screenshot({ path: path.join(shots, `mark-${word}-${type}-${colorScheme}.png`) });
        seen.push({ word, where: `${type} ${colorScheme}`, shape: await lens.evaluate(shape, png.toString('base64')) });
      }
    }
  }
  for (const a of seen) {
    finding.ask(a.shape.inked > 12, `${a.word} cannot be seen: ${a.where}`);
    for (const b of seen) {
      if (a === b) continue;
      const apart = a.shape.bits.reduce((n, bit, i) => n + (bit !== b.shape.bits[i] ? 1 : 0), 0);
      if (a.word === b.word) finding.ask(apart <= 40, `${a.word} changes its shape: ${a.where}, ${b.where}: ${apart} px`);
      else finding.ask(apart >= 20, `${a.word} (${a.where}) looks like ${b.word} (${b.where}): ${apart} px apart`);
    }
  }
  await tab.close();
  await lens.close();
}

/** A picture as ink and ground: what differs from its corner by a fifth of the range. */
async function shape(base64) {
  const image = new Image();
  image.src = `data:image/png;base64,${base64}`;
  await image.decode();
  const canvas = new OffscreenCanvas(26, 14);
  const draw = canvas.getContext('2d');
  draw.drawImage(image, 0, 0, 26, 14);
  const data = draw.getImageData(0, 0, 26, 14).data;
  const light = Array.from({ length: 26 * 14 }, (_, i) => 0.299 * data[4 * i] + 0.587 * data[4 * i + 1] + 0.114 * data[4 * i + 2]);
  const bits = light.map((l) => Math.abs(l - light[0]) > 51);
  return { bits, inked: bits.filter(Boolean).length };
}

/** With the colours of the reader's system everything is still there to be seen. */
export async function forced(context, finding) {
  const tab = await context.newPage();
  for (const [name, file] of kinds()) {
    for (const colorScheme of ['light', 'dark']) {
      await tab.emulateMedia({ forcedColors: 'active', colorScheme });
      await tab.goto(url(file));
      const seen = await tab.evaluate(visible);
      finding.look(seen.looked);
      for (const fault of seen.faults) finding.faults.push(`${short(file)} ${colorScheme}: ${fault}`);
      await tab.evaluate(axeSource);
      const result = await tab.evaluate(() => globalThis.axe.run(document, { runOnly: ['color-contrast'] }));
      for (const v of result.violations) finding.faults.push(`${short(file)} forced ${colorScheme}: ${v.nodes[0].target} ${v.nodes[0].any[0]?.message}`);
    }
    await tab.screenshot({ path: path.join(shots, `forced-${name.replace(/ /g, '-')}.png`) });
  }
  await tab.emulateMedia({ forcedColors: 'none', colorScheme: 'light' });
  await tab.close();
}

function visible() {
  const faults = new Set();
  let looked = 0;
  const ground = getComputedStyle(document.querySelector('.sheet')).backgroundColor;
  const parts = [['fill', '.mk-bar, .bar:not(.b-open), .arw'], ['stroke', '.mk-line, .limit, .need, .jaw, .ln, .frame, .dim, .ext, .mk-dash, .b-open, .ghost']];
  for (const [paint, which] of parts) {
    for (const e of document.querySelectorAll(which)) {
      looked += 1;
      if (getComputedStyle(e)[paint] === ground) faults.add(`${e.getAttribute('class')} cannot be seen`);
    }
  }
  for (const t of document.querySelectorAll('svg text')) {
    looked += 1;
    // these stand on a filled mark
    const filled = t.classList.contains('t-pick') || t.classList.contains('t-in');
    if (getComputedStyle(t).fill === ground && !filled) faults.add(`the label ${t.textContent} cannot be seen`);
  }
  return { looked, faults: [...faults] };
}

/** Screenshots of every kind and state, kept beside the pages. */
export async function pictures(context, finding) {
  const tab = await context.newPage();
  const take = async (file, name, width, colorScheme) => {
    await tab.emulateMedia({ colorScheme });
    await tab.setViewportSize({ width, height: 900 });
    await tab.goto(url(file));
    const png = await tab.screenshot({ fullPage: true, path: path.join(shots, `${name}-${width}-${colorScheme}.png`) });
    finding.ask(png.length > 10000, `${name}: an empty picture`);
  };
  for (const [kind, file] of kinds()) {
    const name = kind.replace(/ /g, '-');
    for (const width of [360, 768, 1300]) await take(file, name, width, 'light');
    await take(file, name, 1300, 'dark');
  }
  for (const file of ofStates(states)) await take(file, short(file).replace(/[/.]/g, '-'), 1300, 'light');
  await tab.close();
}
