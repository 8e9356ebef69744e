'use client';

import Link from 'next/link';
import { moveRowFocus, type Column } from './data-table-core';

type BodyRowProps<Row> = {
  row: Row; columns: readonly Column<Row>[]; href: string | undefined; onOpen: (href: string) => void;
  /** One row at a time stands in the order of the Tab key; the arrows move within. */
  isActive: boolean; onActive: () => void;
  /** On a phone it waits until more is asked for. */
  isBeyond: boolean;
};

const isOwnControl = (event: React.SyntheticEvent): boolean => event.target instanceof HTMLElement && event.target.closest('a, button, input, select, textarea, summary, label') !== null;

/** A row of the table; on a phone a card with its heading first. */
export function BodyRow<Row>({ row, columns, href, onOpen, isActive, onActive, isBeyond }: BodyRowProps<Row>) {
  const open = (event: React.SyntheticEvent) => {
    if (href && !isOwnControl(event)) onOpen(href);
  };
  return (
    <tr tabIndex={isActive ? 0 : -1} onFocus={onActive} onClick={open} onKeyDown={(event) => (event.key === 'Enter' ? open(event) : moveRowFocus(event))}
      className={`border-b border-rule last:border-b-0 focus-visible:-outline-offset-2 ${isBeyond ? 'max-md:flex max-md:not-print:hidden' : 'max-md:flex'} max-md:flex-col max-md:px-4 max-md:py-3 ${href ? 'cursor-pointer hover:bg-wash/60' : ''}`}>
      {columns.map((column) => (column.isTitle ? <TitleCell key={column.id} row={row} column={column} href={href} /> : <BodyCell key={column.id} row={row} column={column} />))}
    </tr>
  );
}

type CellProps<Row> = { row: Row; column: Column<Row> };
const contentOf = <Row,>({ row, column }: CellProps<Row>) => (column.cell ? column.cell(row) : column.value(row));
const placeOf = <Row,>({ align }: Column<Row>) => (align === 'right' ? 'text-right num' : 'text-left');

function TitleCell<Row>({ row, column, href }: CellProps<Row> & { href: string | undefined }) {
  const content = contentOf({ row, column });
  return (
    <th scope="row" className={`px-3 py-[10px] align-middle font-semibold max-md:order-first max-md:px-0 max-md:py-0 max-md:text-left ${placeOf(column)}`}>
      {href ? <Link href={href} tabIndex={-1} className="text-ink no-underline hover:underline">{content}</Link> : content}
    </th>
  );
}

function BodyCell<Row>({ row, column }: CellProps<Row>) {
  const content = contentOf({ row, column });
  const isEmpty = content === null || content === '';
  return (
    <td className={`px-3 py-[10px] align-middle max-md:flex max-md:justify-between max-md:gap-4 max-md:px-0 max-md:py-[3px] max-md:text-left ${isEmpty ? 'max-md:hidden' : ''} ${placeOf(column)}`}>
      {column.header === '' ? null : <span aria-hidden className="shrink-0 text-small text-ink-3 md:hidden">{column.header}</span>}
      <span className="min-w-0 max-md:text-right">{content}</span>
    </td>
  );
}
