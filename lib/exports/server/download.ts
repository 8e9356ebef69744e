import 'server-only';

const TYPES = { xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', csv: 'text/csv; charset=utf-8' } as const;

/** A file to keep, under a name that every system takes. */
export function download(content: Buffer | string, name: string, kind: keyof typeof TYPES): Response {
  const filename = `${name.normalize('NFKD').replaceAll('/', '-').replace(/[^\w -]+/g, '').trim().replace(/\s+/g, '-').toLowerCase() || 'file'}.${kind}`;
  const body = typeof content === 'string' ? content : new Uint8Array(content);
  return new Response(body, { headers: { 'Content-Type': TYPES[kind], 'Content-Disposition': `attachment; filename="${filename}"`, 'Cache-Control': 'no-store', 'X-Content-Type-Options': 'nosniff' } });
}
