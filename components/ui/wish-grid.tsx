'use client';

type WishWindow = { weekday: number; fromMin: number; toMin: number };

const DAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday'] as const;
/** Parts of the day as families think of them. */
const PARTS = [
  { label: 'Morning', short: '9–12', fromMin: 540, toMin: 720 },
  { label: 'Early afternoon', short: '12–15', fromMin: 720, toMin: 900 },
  { label: 'After school', short: '15–18', fromMin: 900, toMin: 1080 },
  { label: 'Evening', short: '18–21', fromMin: 1080, toMin: 1260 },
] as const;

type WishGridProps = { value: readonly WishWindow[]; onChange: (windows: WishWindow[]) => void; error?: string; legend?: string };

/** When the student could come: one tap a part of a day. Neighbouring parts count as one long window. */
export function WishGrid({ value, onChange, error, legend = 'When could the student come?' }: WishGridProps) {
  const isOn = (weekday: number, fromMin: number) => value.some((window) => window.weekday === weekday && window.fromMin <= fromMin && fromMin < window.toMin);
  const toggle = (weekday: number, fromMin: number) => {
    const cells = DAYS.flatMap((_, index) => PARTS.map((part) => ({ weekday: index + 1, fromMin: part.fromMin, toMin: part.toMin })));
    const chosen = cells.filter((cell) => isOn(cell.weekday, cell.fromMin) !== (cell.weekday === weekday && cell.fromMin === fromMin));
    onChange(joined(chosen));
  };
  return (
    <fieldset>
      <legend className="mb-1 text-[14px] font-semibold">{legend}</legend>
      <table className="w-full table-fixed border-separate border-spacing-1">
        <thead>
          <tr>
            <th className="w-[34%] sm:w-[26%]"><span className="sr-only">Day</span></th>
            {PARTS.map(({ label, short }) => <th key={label} scope="col" className="text-small font-normal text-ink-3"><span className="sr-only">{label} </span>{short}</th>)}
          </tr>
        </thead>
        <tbody>
          {DAYS.map((day, index) => (
            <tr key={day}>
              <th scope="row" className="text-left font-normal">{day}</th>
              {PARTS.map(({ label, fromMin }) => (
                <td key={label} className="p-0">
                  <label className="flex h-10 items-center justify-center rounded border border-rule bg-sheet has-checked:border-petrol has-checked:bg-petrol-wash has-focus-visible:outline-2 has-focus-visible:outline-petrol">
                    <input type="checkbox" className="size-[17px] accent-petrol" aria-label={`${day}, ${label.toLowerCase()}`} checked={isOn(index + 1, fromMin)} onChange={() => toggle(index + 1, fromMin)} />
                  </label>
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {error ? <p role="alert" className="text-small font-semibold text-brick">{error}</p> : null}
    </fieldset>
  );
}

/** Windows that touch on the same day become one. */
function joined(cells: readonly WishWindow[]): WishWindow[] {
  const windows: WishWindow[] = [];
  for (const cell of cells) {
    const last = windows.at(-1);
    if (last && last.weekday === cell.weekday && last.toMin === cell.fromMin) last.toMin = cell.toMin;
    else windows.push({ ...cell });
  }
  return windows;
}
