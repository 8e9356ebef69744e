import 'server-only';
import { getServerSession } from 'next-auth';
import { forbidden, redirect } from 'next/navigation';
import { cache } from 'react';
import { findSchool } from '@/db/school';
import type { Action, SubjectName } from '@/policies/ability';
import { authOptions } from './auth';
import { database } from './database';
import { contextOfUser, type SignedIn } from './user-context';

export type { Context, SignedIn } from './user-context';

const nowSeconds = () => Math.floor(Date.now() / 1000);

/** Who is asking, once per request. */
export const currentContext = cache(async (): Promise<SignedIn | null> => {
  const session = await getServerSession(authOptions);
  if (!session?.userId) return null;
  return contextOfUser(database(), session.userId, nowSeconds());
});

export async function requireContext(): Promise<SignedIn> {
  const context = await currentContext();
  if (context) return context;
  return redirect((await findSchool(database())) ? '/sign-in' : '/set-up');
}

/** For pages: turns away people who could never use the screen. Operations still check each record. */
export async function requireContextTo(action: Action, name: SubjectName): Promise<SignedIn> {
  const context = await requireContext();
  return context.ability.can(action, name) ? context : forbidden();
}

declare module 'next-auth' {
  interface Session { userId?: string }
}
