import NextAuth from 'next-auth';
import { authOptions } from '@/lib/server/auth';

const handler = NextAuth(authOptions) as (request: Request, context: unknown) => Promise<Response>;

export { handler as GET, handler as POST };
