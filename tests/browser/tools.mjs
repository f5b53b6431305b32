// What the checks share: the tools installed beside the sources, the browser, the report of checks.
import { createRequire } from 'node:module';
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');
export const out = path.join(root, 'tests/artefacts');
export const pagesDir = path.join(out, 'pages');
export const shots = path.join(out, 'screenshots');
export const papers = path.join(out, 'papers');
export const program = process.env.FILMWRIGHT ?? path.join(root, 'target/debug/filmwright');

const installed = createRequire(path.join(root, 'tests/.tools/browser/package.json'));
export const { HtmlValidate } = installed('html-validate');
export const axeSource = readFileSync(installed.resolve('axe-core/axe.min.js'), 'utf8');
const { chromium } = installed('playwright-core');

const switches = [
  '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run',
  '--disable-background-networking', '--disable-component-update', '--disable-sync',
];

/** Chromium of the system, with a profile of its own that is gone afterwards. */
export async function withBrowser(work) {
  const profile = mkdtempSync(path.join(tmpdir(), 'filmwright-chromium-'));
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', headless: true, args: switches,
    viewport: { width: 1300, height: 900 },
  });
  try {
    return await work(context);
  } finally {
    await context.close();
    rmSync(profile, { recursive: true, force: true, maxRetries: 3 });
  }
}

/** Runs the program; what it prints. */
export function filmwright(args, cwd = out) {
  return execFileSync(program, args, { cwd, encoding: 'utf8', stdio: ['ignore', 'pipe', 'pipe'], maxBuffer: 1 << 28 });
}

/** Page files of a folder below the pages, sorted. */
export function pagesIn(name) {
  return readdirSync(path.join(pagesDir, name)).filter((f) => f.endsWith('.html')).sort()
    .map((f) => path.join(pagesDir, name, f));
}

export const page = (...parts) => path.join(pagesDir, ...parts);
export const url = (file) => pathToFileURL(file).href;
export const short = (file) => path.relative(pagesDir, file);

/** Collects what a check found; a check that looked at nothing fails. */
export class Finding {
  constructor(name) { this.name = name; this.faults = []; this.looked = 0; }
  look(n = 1) { this.looked += n; }
  /** Notes a fault unless `sound`. */
  ask(sound, words) { this.looked += 1; if (!sound) this.faults.push(words); return sound; }
}
