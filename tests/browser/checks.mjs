// Runs the checks and prints a line for each; names as arguments choose among them.
import { mkdirSync } from 'node:fs';
import { Finding, papers, shots, withBrowser } from './tools.mjs';
import { make } from './sites.mjs';
import { accessible, keyboard, reflow } from './access.mjs';
import { quiet, policy, hostile } from './safe.mjs';
import { labels, numbers } from './figures.mjs';
import { marks, forced, pictures } from './looks.mjs';
import { paper } from './paper.mjs';
import { valid, same, scale } from './files.mjs';
import { states, sober } from './words.mjs';

const checks = {
  valid, same, states, sober, accessible, keyboard, reflow, quiet, policy, hostile, labels, numbers, marks, forced, paper, scale, pictures,
};

const wanted = process.argv.slice(2);
const chosen = Object.entries(checks).filter(([name]) => wanted.length === 0 || wanted.includes(name));
mkdirSync(shots, { recursive: true });
mkdirSync(papers, { recursive: true });
const started = Date.now();
if (!process.env.KEEP_PAGES) make();
const most = Number(process.env.FAULTS ?? 25);
let failed = 0;
await withBrowser(async (context) => {
  for (const [name, check] of chosen) {
    const finding = new Finding(name);
    const began = Date.now();
    try {
      await check(context, finding);
    } catch (error) {
      finding.faults.push(error.stack ?? String(error));
    }
    if (finding.looked === 0 && finding.faults.length === 0) finding.faults.push('looked at nothing');
    const seconds = ((Date.now() - began) / 1000).toFixed(1);
    const bad = finding.faults.length;
    console.log(`${bad ? 'FAIL' : 'ok  '} ${name}: ${finding.looked} looked at, ${bad} faults, ${seconds} s${finding.note ? `; ${finding.note}` : ''}`);
    for (const fault of finding.faults.slice(0, most)) console.log(`     ${fault}`);
    if (bad > most) console.log(`     and ${bad - most} more`);
    failed += bad ? 1 : 0;
  }
});
console.log(`${chosen.length - failed} of ${chosen.length} checks passed in ${((Date.now() - started) / 1000).toFixed(0)} s`);
process.exit(failed ? 1 : 0);
