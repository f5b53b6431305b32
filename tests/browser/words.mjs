// What the pages say: each state in its words, every sheet sober and signed.
import path from 'node:path';
import { pagesIn, short, url } from './tools.mjs';
import { most } from './kinds.mjs';

/** What the machine's sheet of a state must say, and what the overview. */
const said = {
  'nothing-holds': [/None of the three oils weighed holds/, /Nothing is released: no oil on the list serves/],
  'everything-barred': [/Each of the three oils on the list is barred here/, /Nothing is released/],
  open: [/Not decided: .+ is open/, /Nothing is released: the verdict is open until the gaps are closed/],
  'unknown-oil': [/What is in it now is not known/, /find out and remove what is in it/],
  'one-candidate': [/Keep G-220\. It is tight|The only oil weighed/],
  'forty-candidates': [/further oils that fail stand in the table only/],
  'long-names': [/reclaimer belt/],
  'no-ambient': [/[Aa]mbient not stated/],
  imperial: [/°F/],
  'logo-and-notes': [/Access/, /Monday/],
};

export async function states(context, finding) {
  const tab = await context.newPage();
  for (const [name, wanted] of Object.entries(said)) {
    const kind = name === 'logo-and-notes' ? 'index' : 'machine-';
    const file = pagesIn(name).find((f) => path.basename(f).startsWith(kind));
    await tab.goto(url(file));
    const text = await tab.evaluate(() => document.querySelector('main').innerText);
    for (const words of wanted) finding.ask(words.test(text), `${short(file)}: says nothing like ${words}`);
    if (name === 'imperial') {
      const main = text.replace(/Worked from[\s\S]*?(?=\n\d+\n)/, '');
      const left = [...main.matchAll(/.{0,40}\d\u202f(°C|K\b|L\b)/g)].map((m) => m[0]).filter((m) => !/written/.test(m));
      finding.ask(left.length === 0, `${short(file)}: not in the units asked for: ${left.slice(0, 4).join(' | ')}`);
    }
  }
  // the lead and the reasons follow the units on every sheet of the demonstration
  for (const file of pagesIn('demo-us').filter((f) => /machine-/.test(f))) {
    await tab.goto(url(file));
    const text = await tab.evaluate(() => [...document.querySelectorAll('.answer .lead, .answer .say, .oils .why, .caution dd, .conditions li')].map((e) => e.innerText).join('\n'));
    finding.ask(!/\d\u202f(°C|K\b)/.test(text), `${short(file)}: ${text.match(/.{0,50}\d\u202f(°C|K\b).{0,20}/)?.[0]}`);
  }
  await tab.close();
}

const praise = /\b(excellent|optimal|perfect|superior|outstanding|guaranteed|recommended|recommend|please|congratulations|world-class|best choice|best oil)\b/i;

/** Caution, deferral and signatures on every sheet; no praise, no exclamation. */
export async function sober(context, finding) {
  const tab = await context.newPage();
  for (const file of most()) {
    await tab.goto(url(file));
    const seen = await tab.evaluate(() => [...document.querySelectorAll('article.sheet')].map((sheet) => {
      const words = sheet.cloneNode(true);
      // formulas have factorials of their own, users their own words
      words.querySelectorAll('math, .prose, code').forEach((e) => e.remove());
      const caution = [...sheet.querySelectorAll('.caution dt')].map((e) => e.textContent);
      return {
        name: sheet.querySelector('.name').textContent, text: words.textContent, caution,
        verdicts: sheet.querySelector('table.oils, .parts, .wide') !== null,
        sign: [...sheet.querySelectorAll('.sign > div')].map((d) => d.querySelector('p')?.textContent.trim() ?? ''),
        machine: /^machine-/.test(sheet.id),
      };
    }));
    for (const s of seen) {
      // what stands in the hostile site are its user's words
      finding.ask(!s.text.includes('!') || /hostile/.test(file), `${short(file)} ${s.name}: an exclamation mark`);
      finding.ask(!praise.test(s.text), `${short(file)} ${s.name}: "${s.text.match(praise)?.[0]}"`);
      if (s.machine) {
        for (const part of ['Judged here', 'Not judged', 'Comes before it']) finding.ask(s.caution.includes(part), `${short(file)} ${s.name}: no "${part}" in the caution`);
        finding.ask(s.sign.length === 3 && s.sign.every((words) => words.length > 10), `${short(file)} ${s.name}: ${s.sign.length} boxes to sign, or one that does not say what it accepts`);
      } else if (s.verdicts) {
        finding.ask(s.caution.includes('Comes before it'), `${short(file)} ${s.name}: no caution`);
      }
    }
  }
  await tab.close();
}
