import { existsSync } from 'node:fs';

/** The settings kept in `.env`, for a command that is run by itself; what the environment already holds wins. */
export function readSettingsFile(): void {
  if (existsSync('.env')) process.loadEnvFile('.env');
}
