import type { NextConfig } from 'next';

const config: NextConfig = {
  distDir: process.env.NEXT_DIST_DIR ?? '.next',
  // Knex reaches for every driver it knows; left outside the bundle it only loads ours.
  serverExternalPackages: ['knex', 'better-sqlite3', '@node-rs/argon2', 'pino', 'exceljs', 'stripe', 'nodemailer'],
  // Types are checked by a step of their own, before the build.
  typescript: { ignoreBuildErrors: true },
  poweredByHeader: false,
  agentRules: false,
  images: { unoptimized: true },
  experimental: { authInterrupts: true, serverActions: { bodySizeLimit: '12mb' } },
  devIndicators: false,
};

export default config;
