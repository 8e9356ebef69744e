'use client';

import { Bar, BarChart, ResponsiveContainer, XAxis, YAxis } from 'recharts';

type Row = { short: string; tuitionMinor: number; payMinor: number; share: string };
const ROW_HEIGHT = 34;

/** Petrol for tuition, brass for pay; the share in words at the end of each pair. The figures stand in the table below. */
export function PayShareChart({ rows }: { rows: readonly Row[] }) {
  const most = Math.max(...rows.map(({ tuitionMinor, payMinor }) => Math.max(tuitionMinor, payMinor)), 1);
  return (
    <div aria-hidden>
      <div className="flex items-stretch gap-2">
        <div className="min-w-0 flex-1">
          <ResponsiveContainer width="100%" height={rows.length * ROW_HEIGHT} initialDimension={{ width: 200, height: rows.length * ROW_HEIGHT }}>
            <BarChart accessibilityLayer={false} data={[...rows]} layout="vertical" margin={{ top: 0, right: 0, bottom: 0, left: 0 }} barGap={1} barCategoryGap={7}>
              <XAxis type="number" hide domain={[0, most]} />
              <YAxis type="category" dataKey="short" width={44} tickLine={false} axisLine={false} tick={{ fontSize: 13, fill: '#686c7d' }} />
              <Bar dataKey="tuitionMinor" fill="#1d5a73" isAnimationActive={false} />
              <Bar dataKey="payMinor" fill="#b8691a" isAnimationActive={false} />
            </BarChart>
          </ResponsiveContainer>
        </div>
        <ul className="flex flex-col text-small">{rows.map((row) => <li key={row.short} className="num flex items-center justify-end" style={{ height: ROW_HEIGHT }}>{row.share}</li>)}</ul>
      </div>
      <p className="mt-1 flex gap-4 text-small text-ink-3">
        <span><span className="inline-block size-[10px] bg-petrol" /> tuition</span>
        <span><span className="inline-block size-[10px] bg-brass-fill" /> pay</span>
      </p>
    </div>
  );
}
