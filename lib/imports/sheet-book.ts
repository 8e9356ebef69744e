import { nameKey } from '../people/names';
import { KIND_WORDS, type SheetKind } from './columns';
import type { Known } from './known';
import { faulty, read, type Reading } from './reading';
import type { Reference } from './rows';

type Entry = { references: Reference[]; wasLeftOut: boolean };

/**
 * What the rows read so far have named, by kind and name, so that later sheets can refer to it. A name that
 * stands only in rows that were left out is told apart from one that stands nowhere.
 */
export function sheetBook(known: Known) {
  const entries = new Map<string, Entry>();
  const at = (kind: SheetKind, name: string): Entry => {
    const key = `${kind}:${nameKey(name)}`;
    const entry = entries.get(key) ?? { references: [], wasLeftOut: false };
    entries.set(key, entry);
    return entry;
  };
  return {
    accept: (kind: SheetKind, name: string, reference: Reference) => void at(kind, name).references.push(reference),
    leaveOut: (kind: SheetKind, name: string) => void (at(kind, name).wasLeftOut = true),
    find: (kind: SheetKind, name: string): Reading<Reference> => {
      const word = KIND_WORDS[kind].one;
      if (nameKey(name) === '') return faulty(`${word} is missing`);
      const { references, wasLeftOut } = at(kind, name);
      if (references.length > 1) return faulty(`more than one ${word} has this name`);
      if (references[0]) return read(references[0]);
      if (wasLeftOut) return faulty(`${word} was not imported`);
      const id = known.byName[kind].get(nameKey(name));
      if (id === null) return faulty(`more than one ${word} has this name`);
      return id === undefined ? faulty(`${word} is not known`) : read({ id });
    },
  };
}
