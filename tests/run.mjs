#!/usr/bin/env node
/**
 * The whole check, in the order in which it is cheapest to fail: types, lint, import rules, dead code, unit and
 * published checks (time rules under three process zones), build, browser tests. Installs what is missing. The
 * last line counts every check of every runner: "N passed, N failed".
 *   --only=a,b   runs these steps only     --list   names the steps
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

process.chdir(path.resolve(import.meta.dirname, '..'));
const only = process.argv.find((argument) => argument.startsWith('--only='))?.slice('--only='.length).split(',');
const count = { passed: 0, failed: 0 };
const say = (text) => process.stdout.write(`${text}\n`);
mkdirSync('var', { recursive: true });

const run = (command, args, env = {}) => spawnSync(command, args, { stdio: 'inherit', env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', ...env } }).status === 0;

function install() {
  const stamp = 'node_modules/.rungwell-lock';
  const wanted = createHash('sha256').update(readFileSync('package-lock.json')).digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return true;
  if (!run('npm', ['ci', '--no-audit', '--no-fund', '--include=dev'])) return false;
  writeFileSync(stamp, wanted);
  return true;
}

/** Debian's Chromium drives the browser tests; the test library's own download is not used. */
function browser() {
  if (existsSync('/usr/bin/chromium')) return true;
  say('Chromium is not installed; installing Debian’s package “chromium” …');
  const isInstalled = run('apt-get', ['update']) && run('apt-get', ['install', '-y', '--no-install-recommends', 'chromium'], { DEBIAN_FRONTEND: 'noninteractive' });
  if (!isInstalled) say('It could not be installed: this needs Debian’s apt-get and the rights to use it. Install “chromium” by hand and run the check again.');
  return isInstalled && existsSync('/usr/bin/chromium');
}

const readJson = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null);

function vitest(name, paths = [], env = {}) {
  const file = `var/vitest-${name}.json`;
  writeFileSync(file, 'null');
  const ok = run('npx', ['vitest', 'run', '--config', 'tests/vitest.config.ts', '--reporter=dot', '--reporter=json', `--outputFile.json=${file}`, ...paths], env);
  const report = readJson(file);
  if (!report) return { passed: 0, failed: 1 };
  // A file that could not even be loaded counts as one failed check.
  const unloaded = report.testResults.filter(({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0).length;
  const failed = report.numFailedTests + unloaded;
  return { passed: report.numPassedTests, failed: ok ? failed : Math.max(1, failed) };
}

function playwright() {
  const file = 'var/playwright.json';
  writeFileSync(file, 'null');
  const ok = run('npx', ['playwright', 'test', '--config', 'tests/playwright.config.ts'], { PLAYWRIGHT_JSON_OUTPUT_FILE: path.resolve(file) });
  const stats = readJson(file)?.stats;
  if (!stats) return { passed: 0, failed: 1 };
  return { passed: stats.expected, failed: ok ? stats.unexpected + stats.flaky : Math.max(1, stats.unexpected + stats.flaky) };
}

const check = (command, args) => () => (run('npx', [command, ...args]) ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });
const TIME_PATHS = ['lib/time.test.ts', 'lib/format.test.ts', 'lib/calendar', 'tests/published/calendar'];

const STEPS = {
  types: () => {
    // Next writes the types of its routes; without a build they are made here.
    const hasTypes = run('npx', ['next', 'typegen']);
    return hasTypes && run('npx', ['tsc', '--noEmit', '-p', '.']) ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
  },
  lint: check('eslint', ['-c', 'tests/lint/eslint.config.mjs', '--max-warnings=0', '.']),
  imports: check('depcruise', ['--config', 'tests/lint/imports.cjs', 'app', 'components', 'lib', 'policies', 'db', 'jobs', 'tests']),
  'dead-code': check('knip', ['--config', 'tests/lint/knip.json', '--no-progress']),
  unit: () => vitest('unit'),
  'zone-west': () => vitest('west', TIME_PATHS, { TZ: 'America/Los_Angeles' }),
  'zone-east': () => vitest('east', TIME_PATHS, { TZ: 'Asia/Tokyo' }),
  build: check('next', ['build']),
  browser: () => (browser() ? playwright() : { passed: 0, failed: 1 }),
};

if (process.argv.includes('--list')) {
  say(Object.keys(STEPS).join('\n'));
  process.exit(0);
}
if (!install()) {
  say('The packages could not be installed.\n0 passed, 1 failed');
  process.exit(1);
}
for (const [name, step] of Object.entries(STEPS)) {
  if (only && !only.includes(name)) continue;
  const started = Date.now();
  say(`\n── ${name} ──`);
  const result = step();
  count.passed += result.passed;
  count.failed += result.failed;
  say(`${name}: ${result.failed === 0 ? 'fine' : 'FAILED'} (${((Date.now() - started) / 1000).toFixed(1)} s)`);
}
say(`\n${count.passed} passed, ${count.failed} failed`);
process.exit(count.failed === 0 && count.passed > 0 ? 0 : 1);
