/** A form's nested value: `line_items[0][price_data][currency]` becomes lists and objects. */
export type FormValue = string | FormValue[] | { [name: string]: FormValue };
export type Form = { [name: string]: FormValue };

/** Reads the bracketed form encoding that the processor's library sends. */
export function parseForm(body: string): Form {
  const form: Form = {};
  for (const [key, value] of new URLSearchParams(body)) {
    const path = key.split(/[[\]]+/).filter((part) => part !== '');
    setIn(form, path.some((part) => part === '__proto__' || part === 'constructor') ? ['ignored'] : path, value);
  }
  return listsOf(form) as Form;
}

function setIn(form: Form, path: string[], value: string): void {
  const [head, ...rest] = path;
  if (head === undefined) return;
  if (rest.length === 0) {
    form[head] = value;
    return;
  }
  const inner = form[head];
  const child: Form = typeof inner === 'object' && !Array.isArray(inner) ? inner : {};
  form[head] = child;
  setIn(child, rest, value);
}

/** Objects whose names are 0, 1, 2 … are lists. */
function listsOf(value: FormValue): FormValue {
  if (typeof value === 'string' || Array.isArray(value)) return value;
  const entries = Object.entries(value).map(([name, inner]) => [name, listsOf(inner)] as const);
  const isList = entries.length > 0 && entries.every(([name], index) => name === String(index));
  return isList ? entries.map(([, inner]) => inner) : Object.fromEntries(entries);
}

/** The text at a path, or undefined when there is none. */
export function textAt(form: FormValue | undefined, ...path: (string | number)[]): string | undefined {
  let here: FormValue | undefined = form;
  for (const step of path) {
    if (typeof here !== 'object') return undefined;
    here = Array.isArray(here) ? here[Number(step)] : here[String(step)];
  }
  return typeof here === 'string' ? here : undefined;
}
