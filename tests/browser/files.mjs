// The files themselves: valid HTML, the same bytes twice, and a site of a thousand machines.
import { execFileSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { HtmlValidate, filmwright, out, page, pagesDir, pagesIn, program, root, short, url } from './tools.mjs';
import { most } from './kinds.mjs';
import { large } from './sites.mjs';

const config = {
  root: true,
  extends: ['html-validate:recommended', 'html-validate:document', 'html-validate:a11y'],
  rules: {
    // style, not validity: the pages are set close, with entities only where they are needed
    'no-trailing-whitespace': 'off', 'doctype-style': 'off', 'void-style': 'off', 'no-raw-characters': ['error', { relaxed: true }],
    'attr-quotes': ['error', { style: 'double' }], 'long-title': 'off', 'no-inline-style': 'error', 'require-sri': 'off',
    // sections that scroll are named regions that take the focus: a scrolling table must be reached by key
    'no-implicit-input-type': 'error', 'prefer-native-element': 'error', 'tel-non-breaking': 'off',
  },
};

/** Every page is valid HTML. */
export async function valid(context, finding) {
  const judge = new HtmlValidate(config);
  for (const file of most()) {
    const report = await judge.validateString(readFileSync(file, 'utf8'), file);
    finding.look();
    for (const m of report.results.flatMap((r) => r.messages).slice(0, 5)) finding.faults.push(`${short(file)}:${m.line}:${m.column} ${m.ruleId}: ${m.message}`);
  }
}

/** The same inputs give the same bytes, in a folder and in one file. */
export async function same(context, finding) {
  const again = page('again');
  filmwright(['report', '--demo', '-q', '-o', again]);
  for (const file of readdirSync(page('demo'))) {
    finding.ask(readFileSync(path.join(again, file)).equals(readFileSync(page('demo', file))), `${file} differs from run to run`);
  }
  const once = filmwright(['report', '--demo', '-q', '--one-file', '-o', '-']);
  finding.ask(once === readFileSync(page('one-file', 'review.html'), 'utf8'), 'the one file differs from run to run');
}

/** Seconds and MB of one run of the program, told by the system. */
function measured(command, args) {
  const script = 'import resource, subprocess, sys, time\nt = time.time()\nsubprocess.run(sys.argv[1:], check=True, stdout=subprocess.DEVNULL)\nprint(time.time() - t, resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss / 1024)';
  const told = execFileSync('python3', ['-c', script, command, ...args], { encoding: 'utf8' });
  const [seconds, megabytes] = told.trim().split(' ').map(Number);
  return { seconds, megabytes };
}

/** A thousand machines: pages stay small, the overview grouped, memory flat, Chromium quick. */
export async function scale(context, finding) {
  const files = large(1000);
  const folder = path.join(out, 'sites', 'large');
  mkdirSync(folder, { recursive: true });
  for (const [name, text] of [['site.yaml', files.site], ['oils.yaml', files.oils]]) writeFileSync(path.join(folder, name), text);
  // time is promised for the program as it is handed over, not as it is built for tests
  const fast = path.join(root, 'target/release/filmwright');
  const handed = existsSync(fast) && statSync(fast).mtimeMs >= statSync(program).mtimeMs;
  const used = handed ? fast : program;
  const run = measured(used, ['report', '-q', '-C', folder, '-o', page('large')]);
  finding.note = `${run.seconds.toFixed(1)} s and ${run.megabytes.toFixed(0)} MB with the ${handed ? 'release' : 'test'} build`;
  finding.ask(run.megabytes <= 300, `${run.megabytes.toFixed(0)} MB for a thousand machines`);
  finding.ask(run.seconds <= (handed ? 5 : 60), `${run.seconds.toFixed(1)} s for a thousand machines`);
  const pages = pagesIn('large');
  finding.ask(pages.filter((f) => /machine-/.test(f)).length === 1000, 'not a sheet for every machine');
  for (const file of [...pages, ...pagesIn('demo')]) {
    finding.ask(statSync(file).size <= 150 * 1000, `${short(file)} has ${Math.round(statSync(file).size / 1000)} kB`);
  }
  const tab = await context.newPage();
  for (const file of pages.filter((f) => /index|area-|machine-MC-000|methods|rules|oil-/.test(f)).slice(0, 40)) {
    const began = Date.now();
    await tab.goto(url(file));
    await tab.evaluate(() => new Promise((done) => { requestAnimationFrame(() => requestAnimationFrame(done)); }));
    const took = Date.now() - began;
    finding.ask(took <= 1000, `${short(file)} opened in ${took} ms`);
    const rows = await tab.evaluate(() => [...document.querySelectorAll('table')].map((t) => ({ rows: t.querySelectorAll('tbody tr:not(.sub)').length, name: (t.caption?.textContent ?? '').slice(0, 40) })));
    for (const t of rows) finding.ask(t.rows <= 100, `${short(file)}: ${t.rows} rows in ${t.name}`);
  }
  await tab.goto(url(page('large', 'index.html')));
  const seen = await tab.evaluate(() => ({
    groups: document.querySelectorAll('.parts .sub').length,
    areas: [...document.querySelectorAll('a[href^="area-"]')].length,
  }));
  finding.ask(seen.groups >= 1 && seen.areas >= 10, `the overview has ${seen.groups} groups and ${seen.areas} links to areas`);
  await tab.close();
}
void pagesDir;
