// Invented sites, one a state that a report can be in, and the pages made from them.
import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { filmwright, out, pagesDir } from './tools.mjs';

const oil = (id, nu40, nu100, more = '') => `${id}:
  name: gear oil of VG ${Math.round(nu40)}
  kind: gear
  classes: [CKC]
  base: mineral I, no polymer
  additives: [EP]
  viscosity: [${nu40} mm2/s at 40 degC, ${nu100} mm2/s at 100 degC]
  pour point: -24 degC
  density: 890 kg/m3 at 15 degC
${more}`;

const few = `file: oils 1\n${oil('G-150', 150, 14.6)}${oil('G-220', 220, 18.9)}${oil('G-320', 320, 24.1)}`;
const one = `file: oils 1\n${oil('G-220', 220, 18.9)}`;
const forty = `file: oils 1\n${Array.from({ length: 40 }, (_, i) => oil(`G-${100 + 5 * i}`, 100 + 5 * i, +(0.312 * (100 + 5 * i) ** 0.77).toFixed(2))).join('')}`;
const barredOils = few.replaceAll('sheared', 'sheared').replaceAll('classes: [CKC]', 'classes: [HM]')
  .replaceAll('additives: [EP]', 'additives: [EP, moly]');

const yard = '    ambient: -10 .. 35 degC, measured\n    sump rise: 40 K, measured\n';
const site = (machine, { head = '', tag = 'G-1', name = 'mill gearbox' } = {}) => `file: site 1
site: Test yard
document: TY-1
revision: B
${head}machines:
  ${tag}:
    name: ${name}
    lubrication: splash
${machine}    parts:
      - gear mesh: slow stage
        pitch-line speed: 9 m/s
`;

const long = 'Secondary reduction gearbox of the north-west reclaimer belt';
const logo = '<svg xmlns="http://www.w3.org/2000/svg" width="120" height="40"><script>alert(1)</script><rect width="120" height="40" fill="#226"/><circle cx="20" cy="20" r="12" fill="#fff"/></svg>';
const notes = `notes: |
  ## Access
  Keys at the *gate*. See [the permit](https://example.org/permit) and [not this](javascript:alert(1)).

  | Day | Work |
  |---|---|
  | Monday | drain |

  <script>alert(1)</script>
`;

/** Every state, by name: its files and what the report is asked for. */
export const states = {
  'nothing-holds': { site: site(`${yard}    oil now: G-150\n    floor: 90 mm2/s, maker\n`), oils: few },
  'everything-barred': { site: site(`${yard}    oil now: G-220\n    asks for: CKC\n    backstop: sprag\n`), oils: barredOils },
  open: { site: site('    ambient: -10 .. 35 degC, measured\n    sump rise: unknown (20 .. 70 K), ask "fitter"\n    oil now: G-220\n'), oils: few },
  'unknown-oil': { site: site(`${yard}    oil now: unknown\n`), oils: few },
  'one-candidate': { site: site(`${yard}    oil now: G-220\n`), oils: one },
  'forty-candidates': { site: site(`${yard}    oil now: G-220\n`), oils: forty },
  'long-names': {
    site: site(`${yard}    area: ${long} area\n    oil now: G-220\n`, { head: `client: ${long}, owner\nareas:\n  ${long} area:\n    exposure: outdoor\n`, tag: 'A-VERY-LONG-TAG-OF-THE-NORTH-WEST-RECLAIMER-BELT-GEARBOX-0001', name: `${long} unit` }),
    oils: few.replaceAll('G-220', 'G-220-OF-A-SUPPLIER-THAT-LIKES-LONG-NAMES-AND-NUMBERS-000001'),
    fix: (s) => s.replace('oil now: G-220', 'oil now: G-220-OF-A-SUPPLIER-THAT-LIKES-LONG-NAMES-AND-NUMBERS-000001'),
  },
  'no-ambient': { site: site('    sump: held at 70 degC, measured\n    oil now: G-220\n'), oils: few },
  imperial: { site: site(`${yard}    oil now: G-220\n`), oils: few, args: ['--units', 'us', '--paper', 'letter'] },
  'logo-and-notes': { site: site(`${yard}    oil now: G-220\n`, { head: `client: Test client\nlogo: logo.svg\n${notes}` }), oils: few, more: { 'logo.svg': logo } },
};

/** A site of so many machines in two areas, like the one of the benchmarks. */
export function large(machines) {
  const bearings = ['22220', '6312', '22316', 'NU 218', '6208', '23134'];
  let seed = 7;
  const unit = () => { seed = (seed * 1103515245 + 12345) % 2147483648; return seed / 2147483648; };
  const between = (a, b) => a + (b - a) * unit();
  let text = 'file: site 1\nsite: Generated works\ndocument: GW-1\nrevision: C\nareas:\n';
  const areas = ['crusher yard', 'mill hall', 'quay', 'kiln deck', 'water house'];
  for (const area of areas) text += `  ${area}:\n    ambient: -18 .. 36 degC\n    exposure: outdoor\n`;
  text += 'machines:\n';
  for (let i = 0; i < machines; i += 1) {
    text += `  MC-${String(i).padStart(4, '0')}:
    area: ${areas[i % areas.length]}
    lubrication: splash
    oil now: OIL-${String(Math.floor(unit() * 30)).padStart(2, '0')}
    fill: ${Math.round(between(5, 200))} L
    sump rise: ${between(12, 45).toFixed(1)} K
    start limit: ${Math.round(between(3000, 40000))} mm2/s, maker
    yellow metal: no
    seals: FKM
    parts:
      - rolling bearing: ${bearings[i % bearings.length]}
        speed: ${Math.round(between(120, 1500))} r/min
      - gear mesh: stage
        pitch-line speed: ${between(1.5, 14).toFixed(2)} m/s
`;
  }
  let oils = 'file: oils 1\n';
  const grades = [46, 68, 100, 150, 220, 320, 460];
  for (let i = 0; i < 30; i += 1) {
    const nu40 = grades[i % grades.length] * between(0.95, 1.05);
    const pao = i % 3 === 2;
    oils += `OIL-${String(i).padStart(2, '0')}:
  kind: gear
  base: ${pao ? 'PAO, no polymer' : 'mineral I, no polymer'}
  classes: [CKC]
  additives: [EP]
  viscosity: [${nu40.toFixed(2)} mm2/s at 40 degC, ${(nu40 ** 0.77 * (pao ? 0.415 : 0.312)).toFixed(3)} mm2/s at 100 degC]
  pour point: ${pao ? -42 : -18} degC
  density: 880 kg/m3 at 15 degC
`;
  }
  return { site: text, oils };
}

const write = (folder, files) => {
  mkdirSync(folder, { recursive: true });
  for (const [name, text] of Object.entries(files)) writeFileSync(path.join(folder, name), text);
};

/** Writes a site and its report; the folder of the pages. */
export function report(name, files, args = []) {
  const folder = path.join(out, 'sites', name);
  const pages = path.join(pagesDir, name);
  write(folder, files);
  filmwright(['report', '-q', '-C', folder, '-o', pages, '--on', '2026-11-02', ...args]);
  return pages;
}

/** Makes every page that the checks look at. */
export function make() {
  mkdirSync(pagesDir, { recursive: true });
  filmwright(['report', '--demo', '-q', '-o', path.join(pagesDir, 'demo')]);
  filmwright(['report', '--demo', '-q', '--units', 'us', '--paper', 'letter', '-o', path.join(pagesDir, 'demo-us')]);
  mkdirSync(path.join(pagesDir, 'one-file'), { recursive: true });
  filmwright(['report', '--demo', '-q', '--one-file', '-o', path.join(pagesDir, 'one-file', 'review.html')]);
  for (const [name, state] of Object.entries(states)) {
    const text = state.fix ? state.fix(state.site) : state.site;
    report(name, { 'site.yaml': text, 'oils.yaml': state.oils, ...state.more }, state.args);
  }
}
