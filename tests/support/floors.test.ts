import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import nextConfig from '@/next.config';

type Locked = { version: string; resolved?: string; integrity?: string; inBundle?: boolean };
const lock = JSON.parse(readFileSync('package-lock.json', 'utf8')) as { packages: Record<string, Locked> };
const packages = Object.entries(lock.packages).filter(([place]) => place !== '').map(([place, locked]) => ({ ...locked, place, name: place.slice(place.lastIndexOf('node_modules/') + 'node_modules/'.length) }));

/** A pre-release counts as older than its release. */
function isAtLeast(version: string, floor: string): boolean {
  const [numbers = '', preRelease] = version.split('+')[0]?.split(/-(.*)/s) ?? [];
  const [have, want] = [numbers.split('.').map(Number), floor.split('.').map(Number)];
  const differs = want.findIndex((part, index) => have[index] !== part);
  return differs === -1 ? preRelease === undefined : (have[differs] ?? 0) > (want[differs] ?? 0);
}

it.each([
  ['1.2.3', '1.2.3', true], ['1.10.0', '1.9.9', true], ['1.2.2', '1.2.3', false], ['2.0.0', '1.9.9', true], ['0.9.9', '1.0.0', false], ['1.2.3-rc.1', '1.2.3', false], ['1.2.4-rc.1', '1.2.3', true],
])('%s against a floor of %s: %s', (version, floor, isEnough) => expect(isAtLeast(version, floor)).toBe(isEnough));

/** Below these versions a flaw is known in what the school would run. Every copy counts, not only the topmost. */
describe('version floors in the lock file', () => {
  it.each([
    ['next', '16.4.5'], ['react', '19.2.6'], ['react-dom', '19.2.6'], ['next-auth', '4.24.15'], ['nodemailer', '9.0.1'], ['zod', '4.6.6'], ['uuid', '11.1.1'],
  ])('every %s is at least %s', (name, floor) => {
    const copies = packages.filter((locked) => locked.name === name);
    expect(copies.length).toBeGreaterThan(0);
    expect(copies.filter(({ version }) => !isAtLeast(version, floor)).map(({ place, version }) => `${place} ${version}`)).toEqual([]);
  });
  it('has no fstream', () => expect(packages.filter(({ name }) => name === 'fstream')).toEqual([]));
  it('names no address, and gives each package’s checksum; what comes inside another package is covered by that one’s', () => {
    expect(packages.filter(({ resolved }) => resolved !== undefined).map(({ place }) => place)).toEqual([]);
    expect(packages.filter(({ integrity, inBundle }) => !integrity && !inBundle).map(({ place }) => place)).toEqual([]);
  });
});

describe('what the framework must not do here', () => {
  const isSource = (name: string) => /\.tsx?$/.test(name);
  const sources = ['app', 'components', 'lib', 'db', 'jobs', 'policies']
    .flatMap((folder) => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => `${folder}/${name}`)).concat(readdirSync('.')).filter(isSource);
  const saying = (pattern: RegExp) => sources.filter((file) => pattern.test(readFileSync(file, 'utf8')));

  it('looks at every source file', () => expect(sources.length).toBeGreaterThan(200));
  it('keeps no answer for the next person', () => expect(saying(/['"]use cache/)).toEqual([]));
  it('draws no pictures from addresses', () => {
    expect(saying(/['"]next\/og['"]/)).toEqual([]);
    expect(saying(/['"]next\/(legacy\/)?image['"]/)).toEqual([]);
    expect(nextConfig.images?.unoptimized).toBe(true);
  });
  it('caches no components and says nothing of what it is built with', () => {
    expect(nextConfig.cacheComponents ?? false).toBe(false);
    expect(nextConfig.poweredByHeader).toBe(false);
  });
});
