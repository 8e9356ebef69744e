#!/usr/bin/env node
/**
 * One command from nothing to a school at work: installs from the lock file, prepares the database, builds, starts
 * the web server, the worker, the local mail server and the local card processor, waits until all answer and says
 * where everything is. Plain JavaScript without dependencies, because nothing is installed yet when it starts.
 *
 *   --empty      a new school without demo data; opens the first-run set-up
 *   --dev        the development server instead of a build
 *   --no-build   trusts the build that is there (used by the browser tests)
 */
import { spawn, spawnSync } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import path from 'node:path';

const root = path.resolve(import.meta.dirname, '..');
process.chdir(root);
const flags = new Set(process.argv.slice(2));
const isDev = flags.has('--dev');
const say = (text) => process.stdout.write(`${text}\n`);

function stop(message) {
  process.stderr.write(`\n${message}\n`);
  process.exit(1);
}

const [major, minor] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 12)) stop(`Rungwell needs Node 20.12 or newer; this is ${process.versions.node}.`);

function readEnvFile(file) {
  if (!existsSync(file)) return {};
  const lines = readFileSync(file, 'utf8').split('\n').map((line) => line.trim()).filter((line) => line !== '' && !line.startsWith('#'));
  return Object.fromEntries(lines.map((line) => [line.slice(0, line.indexOf('=')).trim(), line.slice(line.indexOf('=') + 1).trim().replace(/^(['"])(.*)\1$/, '$2')]));
}

const given = { ...readEnvFile('.env'), ...process.env };
const port = Number(given.PORT ?? 3000);
const databaseFile = given.DATABASE_FILE ?? 'var/school.db';
const folder = path.dirname(databaseFile);
mkdirSync(folder, { recursive: true });

/** The secrets of this machine's own school, made once and kept beside its database. */
function localSecret(name) {
  const file = path.join(folder, `${name}.secret`);
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}

const usesLocalCards = given.STRIPE_SECRET_KEY === undefined;
const usesLocalMail = given.SMTP_HOST === undefined;
const cardPort = given.CARD_PROCESSOR_PORT ?? '4242';
const mailPagePort = given.MAIL_SINK_PORT ?? '8025';
const env = {
  ...given,
  PORT: String(port),
  NODE_ENV: isDev ? 'development' : 'production',
  NEXT_TELEMETRY_DISABLED: '1',
  DATABASE_FILE: databaseFile,
  NEXTAUTH_URL: given.NEXTAUTH_URL ?? `http://localhost:${port}`,
  NEXTAUTH_SECRET: given.NEXTAUTH_SECRET ?? localSecret('session'),
  ...(usesLocalMail && {
    SMTP_HOST: '127.0.0.1', SMTP_PORT: given.SMTP_PORT ?? '2525', MAIL_SINK_PORT: mailPagePort,
    MAIL_SINK_FOLDER: given.MAIL_SINK_FOLDER ?? path.join(folder, 'mail'), MAIL_SINK_URL: `http://127.0.0.1:${mailPagePort}`,
  }),
  ...(usesLocalCards && {
    STRIPE_SECRET_KEY: 'sk_test_local', STRIPE_WEBHOOK_SECRET: localSecret('card-events'), STRIPE_API_HOST: '127.0.0.1', STRIPE_API_PORT: cardPort,
    STRIPE_API_PROTOCOL: 'http', CARD_PROCESSOR_PORT: cardPort, CARD_PROCESSOR_URL: `http://127.0.0.1:${cardPort}`,
    CARD_PROCESSOR_STATE: path.join(folder, 'card-processor.json'), CARD_EVENTS_URL: `http://127.0.0.1:${port}/api/card-events`,
  }),
};

function run(command, args) {
  const { status } = spawnSync(command, args, { stdio: 'inherit', env });
  if (status !== 0) stop(`“${command} ${args.join(' ')}” did not succeed; see above.`);
}

const hashOf = (text) => createHash('sha256').update(text).digest('hex');

function install() {
  const stamp = 'node_modules/.rungwell-lock';
  const wanted = hashOf(readFileSync('package-lock.json'));
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
  say('Installing what the lock file names (the database engine is compiled: about a minute) …');
  const { status } = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--include=dev'], { stdio: 'inherit', env: { ...process.env, NODE_ENV: 'development' } });
  if (status !== 0) stop('The installation did not succeed; see above.');
  writeFileSync(stamp, wanted);
}

const SOURCES = ['app', 'components', 'lib', 'policies', 'db', 'public', 'next.config.ts', 'tailwind.config.ts', 'package-lock.json', 'proxy.ts'];

/** A fingerprint of everything that goes into the build: names, sizes and times. */
function sourceFingerprint() {
  const parts = [];
  const walk = (place) => {
    if (!existsSync(place)) return;
    const info = statSync(place);
    if (info.isDirectory()) for (const name of readdirSync(place).sort()) walk(path.join(place, name));
    else parts.push(`${place}:${info.size}:${Math.floor(info.mtimeMs)}`);
  };
  SOURCES.forEach(walk);
  return hashOf(parts.join('\n'));
}

function build() {
  const stamp = path.join(env.NEXT_DIST_DIR ?? '.next', 'rungwell-sources');
  const wanted = sourceFingerprint();
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
  say('Building …');
  run('npx', ['next', 'build']);
  writeFileSync(stamp, wanted);
}

const tsx = (...args) => ['--conditions=react-server', '--import', 'tsx', ...args];
const children = [];
let isStopping = false;

function start(name, command, args) {
  const child = spawn(command, args, { env, stdio: ['ignore', 'inherit', 'inherit'], detached: process.platform !== 'win32' });
  children.push(child);
  child.on('exit', (code) => {
    if (isStopping) return;
    process.stderr.write(`\nThe ${name} stopped by itself (${code ?? 'signal'}); stopping the rest.\n`);
    shutDown(1);
  });
}

/** Ends every child with its own children; waits a little, then insists. */
function shutDown(code) {
  if (isStopping) return;
  isStopping = true;
  const signalAll = (signal) => {
    for (const child of children) {
      if (child.exitCode !== null || child.signalCode !== null) continue;
      try { process.kill(-child.pid, signal); } catch { /* it has gone already */ }
    }
  };
  signalAll('SIGTERM');
  const deadline = Date.now() + 6000;
  const wait = setInterval(() => {
    const alive = children.some((child) => child.exitCode === null && child.signalCode === null);
    if (alive && Date.now() < deadline) return;
    if (alive) signalAll('SIGKILL');
    clearInterval(wait);
    process.exit(code);
  }, 50);
}
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => shutDown(0));

function assertFree(portNumber, what) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => stop(`Port ${portNumber} is taken, so the ${what} cannot start. Free it, or set another in the environment (see README).`));
    probe.listen(portNumber, '127.0.0.1', () => probe.close(resolve));
  });
}

async function untilHealthy(url, what) {
  const deadline = Date.now() + 90_000;
  while (Date.now() < deadline) {
    if (isStopping) return;
    const isUp = await fetch(url).then((response) => response.ok, () => false);
    if (isUp) return;
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
  process.stderr.write(`\nThe ${what} did not answer within 90 seconds.\n`);
  shutDown(1);
}

async function main() {
  if (!flags.has('--no-install')) install();
  await assertFree(port, 'web server');
  if (usesLocalMail) await assertFree(Number(env.SMTP_PORT), 'local mail server');
  if (usesLocalCards) await assertFree(Number(cardPort), 'local card processor');
  run(process.execPath, tsx('jobs/prepare.ts', ...(flags.has('--empty') ? ['--empty'] : [])));
  if (!isDev && !flags.has('--no-build')) build();

  if (usesLocalMail) start('local mail server', process.execPath, tsx('jobs/local/mail-sink.ts'));
  if (usesLocalCards) start('local card processor', process.execPath, tsx('jobs/local/card-processor.ts'));
  start('worker', process.execPath, tsx('jobs/worker.ts'));
  start('web server', process.execPath, ['node_modules/next/dist/bin/next', isDev ? 'dev' : 'start', '-p', String(port)]);

  await untilHealthy(`http://127.0.0.1:${port}/api/health`, 'web server');
  if (usesLocalMail) await untilHealthy(`${env.MAIL_SINK_URL}/health`, 'local mail server');
  if (usesLocalCards) await untilHealthy(`${env.CARD_PROCESSOR_URL}/health`, 'local card processor');
  if (isStopping) return;
  const guide = spawnSync(process.execPath, tsx('jobs/say-where.ts'), { env, encoding: 'utf8' });
  say(guide.stdout.trimEnd());
}

await main();
