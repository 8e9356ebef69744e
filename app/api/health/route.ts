import { database } from '@/lib/server/database';

export const dynamic = 'force-dynamic';

/** Says whether the server answers and its database can be read. */
export async function GET(): Promise<Response> {
  try {
    await database().raw('SELECT 1');
    return Response.json({ ok: true }, { headers: { 'Cache-Control': 'no-store' } });
  } catch {
    return Response.json({ ok: false }, { status: 503, headers: { 'Cache-Control': 'no-store' } });
  }
}
