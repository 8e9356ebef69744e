import { defineConfig } from '@playwright/test';

/** Two schools at once: the demo school, and an empty one for the day that begins with setting up. */
export const DEMO_URL = 'http://localhost:3210';
export const EMPTY_URL = 'http://localhost:3220';
export const DEMO_MAIL_URL = 'http://127.0.0.1:8235';
export const EMPTY_MAIL_URL = 'http://127.0.0.1:8245';

const common = { cwd: '..', timeout: 240_000, reuseExistingServer: false, gracefulShutdown: { signal: 'SIGTERM', timeout: 8000 } } as const;
const school = (name: string, base: number, flags = '') => ({
  ...common,
  command: `rm -rf var/e2e-${name} && node jobs/up.mjs --no-install --no-build ${flags}`,
  url: `http://localhost:${base}/api/health`,
  env: {
    PORT: String(base), DATABASE_FILE: `var/e2e-${name}/school.db`, SMTP_PORT: String(base + 5), MAIL_SINK_PORT: String(base + 5025), CARD_PROCESSOR_PORT: String(base + 7), LOG_LEVEL: 'warn', TZ: 'UTC',
  },
});

const SCHOOLS = [{ name: 'demo', base: 3210, flags: '' }, { name: 'empty', base: 3220, flags: '--empty' }];
/** `E2E_SCHOOLS=empty` or `demo` starts only one of them, to try one file. */
const WANTED = process.env.E2E_SCHOOLS?.split(',') ?? ['demo', 'empty'];

export default defineConfig({
  testDir: './e2e',
  outputDir: '../var/playwright',
  forbidOnly: Boolean(process.env.CI),
  fullyParallel: false,
  workers: 1,
  timeout: 120_000,
  expect: { timeout: 15_000 },
  reporter: [['list'], ['json']],
  use: {
    baseURL: DEMO_URL,
    locale: 'en-IE',
    actionTimeout: 20_000,
    navigationTimeout: 30_000,
    timezoneId: 'Europe/Dublin',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--no-first-run'],
    },
  },
  webServer: SCHOOLS.filter(({ name }) => WANTED.includes(name)).map(({ name, base, flags }) => school(name, base, flags)),
});
