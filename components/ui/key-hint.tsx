/** Which key does it; where there is no keyboard there is no hint. */
export const KeyHint = ({ keys }: { keys: string }) => <kbd className="rounded-[3px] border border-rule px-[5px] font-sans text-[11px] font-semibold text-ink-3 max-md:hidden pointer-coarse:hidden">{keys}</kbd>;
