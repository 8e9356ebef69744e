import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { findAccount } from '@/db/accounts';
import { signIn } from '@/lib/people/server/sign-in';
import { database } from './database';
import { env } from './env';

/** A session ends twelve hours after the sign-in whatever happens, and after eight hours without use. */
export const ABSOLUTE_SECONDS = 12 * 60 * 60;
const IDLE_SECONDS = 8 * 60 * 60;

const isHttps = () => env().NEXTAUTH_URL.startsWith('https:');
export const sessionCookieName = () => (isHttps() ? '__Host-rungwell-session' : 'rungwell-session');

const seconds = () => Math.floor(Date.now() / 1000);

export const authOptions: NextAuthOptions = {
  secret: env().NEXTAUTH_SECRET,
  session: { strategy: 'jwt', maxAge: IDLE_SECONDS },
  pages: { signIn: '/sign-in', error: '/sign-in', signOut: '/sign-in' },
  cookies: {
    sessionToken: { name: sessionCookieName(), options: { httpOnly: true, sameSite: 'lax', path: '/', secure: isHttps() } },
  },
  providers: [
    CredentialsProvider({
      name: 'E-mail and password',
      credentials: { email: {}, password: {} },
      /** Answers null and throws nothing: whatever is thrown here lands in the address bar. */
      async authorize(credentials, request) {
        const forwarded: unknown = request.headers?.['x-forwarded-for'];
        const address = typeof forwarded === 'string' ? (forwarded.split(',')[0] ?? '') : '';
        const result = await signIn(
          { email: credentials?.email ?? '', password: credentials?.password ?? '', address },
          { db: database(), now: seconds() },
        ).catch(() => null);
        return result?.ok ? { id: result.userId, sessionVersion: result.sessionVersion } : null;
      },
    }),
  ],
  callbacks: {
    /** The client's own `update` data is never merged: it could name another role. */
    async jwt({ token, user, trigger }) {
      if (trigger === 'signIn' && user) {
        return { userId: user.id, sessionVersion: (user as { sessionVersion?: number }).sessionVersion ?? 0, authTime: seconds() };
      }
      const isTooOld = (token.authTime ?? 0) + ABSOLUTE_SECONDS < seconds();
      const account = token.userId && !isTooOld ? await findAccount(database(), token.userId) : undefined;
      const isLive = account?.state === 'live' && account.sessionVersion === token.sessionVersion;
      return isLive ? token : {};
    },
    session: ({ session, token }) => ({ expires: session.expires, userId: token.userId }),
    redirect: ({ url, baseUrl }) => safeRedirect(url, baseUrl),
  },
};

/** Only paths of our own host; anything else leads home. */
export function safeRedirect(url: string, baseUrl: string): string {
  try {
    const target = new URL(url, baseUrl);
    const isOurs = target.origin === new URL(baseUrl).origin && !/^[\\/]{2}/.test(url);
    return isOurs ? target.href : baseUrl;
  } catch {
    return baseUrl;
  }
}

declare module 'next-auth/jwt' {
  interface JWT { userId?: string; sessionVersion?: number; authTime?: number }
}
