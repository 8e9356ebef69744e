'use client';

import { Download, FileSpreadsheet, FileText } from 'lucide-react';
import type { FileKind, ListOffer } from '@/lib/exports/lists';
import { plural } from '@/lib/format';
import { buttonClass } from './button';
import { Menu } from './menu';

const hrefOf = ({ list, runId }: ListOffer, as: FileKind) => `/api/lists/${list}?${new URLSearchParams({ as, ...(runId ? { runId } : {}) })}`;

/** Takes the whole list out as a file, whatever is searched for or hidden on the screen. */
export function ExportMenu({ offer }: { offer: ListOffer }) {
  const heading = `${offer.rows === 1 ? '' : 'All '}${plural(offer.rows, 'row')}${offer.note ? `, ${offer.note}` : ''}`;
  return (
    <Menu align="end" heading={heading} trigger={<button type="button" className={buttonClass('quiet', 'max-md:ml-auto')}><Download size={16} aria-hidden />Export</button>} items={[
      { key: 'xlsx', label: <><FileSpreadsheet size={16} aria-hidden />Spreadsheet (XLSX)</>, downloadHref: hrefOf(offer, 'xlsx') },
      { key: 'csv', label: <><FileText size={16} aria-hidden />Comma-separated (CSV)</>, downloadHref: hrefOf(offer, 'csv') },
    ]} />
  );
}
