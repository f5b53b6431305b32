// Which pages stand for which kind of sheet.
import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { page, pagesDir, pagesIn } from './tools.mjs';

/** One page a kind of sheet: from results where the demonstration has it, else from a model. */
export function kinds() {
  const model = (name) => page('models', `${name}.html`);
  const all = {
    overview: page('demo', 'index.html'),
    machine: page('demo', 'machine-M04.html'),
    'two points': page('demo', 'machine-M12.html'),
    methods: page('demo', 'methods.html'),
    rules: page('demo', 'rules.html'),
    words: page('demo', 'words.html'),
    audit: page('demo', 'audit.html'),
    oil: firstOf('demo', 'oil-'),
    'area model': model('area'),
    'audit model': model('audit'),
    'oil model': model('oil'),
    'revision model': model('revision'),
  };
  return Object.entries(all).filter(([, file]) => file && existsSync(file));
}

function firstOf(folder, start) {
  const name = readdirSync(page(folder)).sort().find((f) => f.startsWith(start));
  return name && page(folder, name);
}

/** The pages of every state: the machine's sheet and the overview of each invented site. */
export function ofStates(states) {
  return Object.keys(states).flatMap((name) => pagesIn(name)
    .filter((f) => /^(machine-|index)/.test(path.basename(f))));
}

/** Every page made but those that differ from another only in their oil or their units. */
export function most() {
  const spare = /demo\/oil-(?!O-0[15]|O-12|G-1)|demo-us\/(?!index|machine-M0[24]|machine-M12|oil-O-05|methods)/;
  return every().filter((f) => !spare.test(f));
}

/** Every page made, those with hostile words and the thousand machines aside. */
export function every() {
  return readdirSync(pagesDir).filter((d) => !/^(hostile|tame|large|again)/.test(d)).sort().flatMap(pagesIn);
}
