import 'server-only';

const KINDS = {
  xlsx: { type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', ending: 'xlsx' },
  csv: { type: 'text/csv; charset=utf-8', ending: 'csv' },
  musicxml: { type: 'application/vnd.recordare.musicxml+xml', ending: 'musicxml' },
  midi: { type: 'audio/midi', ending: 'mid' },
} as const;

/** A file to keep, under a name that every system takes. */
export function download(content: Uint8Array | string, name: string, kind: keyof typeof KINDS): Response {
  const filename = `${name.normalize('NFKD').replace(/[/.]/g, '-').replace(/[^\w -]+/g, '').trim().replace(/\s+/g, '-').toLowerCase() || 'file'}.${KINDS[kind].ending}`;
  const body = typeof content === 'string' ? content : new Uint8Array(content);
  return new Response(body, { headers: { 'Content-Type': KINDS[kind].type, 'Content-Disposition': `attachment; filename="${filename}"`, 'Cache-Control': 'no-store', 'X-Content-Type-Options': 'nosniff' } });
}
