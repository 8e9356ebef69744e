/** The lists that the owner may take out of the house as files. The list of accounts is not among them. */
export const LISTS = ['students', 'families', 'enquiries', 'invoices', 'payments', 'bills'] as const;
export type ListName = (typeof LISTS)[number];

export const FILE_KINDS = ['xlsx', 'csv'] as const;
export type FileKind = (typeof FILE_KINDS)[number];

/** What a screen offers to take out: which list and how many rows it has as a whole, whatever is searched for on the screen. */
export type ListOffer = { list: ListName; rows: number; /** For the bills of one tuition run. */ runId?: string; /** "open and ended lately" */ note?: string };
