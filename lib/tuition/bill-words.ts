/** How a family’s bill stands in a tuition run, in the office’s words. */
export const BILL_WORDS = { planned: 'ready', held: 'held back', problem: 'problem', released: 'released', gone: 'nothing to charge' } as const satisfies Record<string, string>;

/** A bill beside the one of last time. */
export const CHANGE_WORDS = { new: 'first bill', changed: 'changed', gone: 'nothing to charge', same: 'as last time' } as const satisfies Record<string, string>;
