-- What an import read and what it made, so that it can be undone while nobody has built on it.

-- The uploaded workbook until it is read, then its cells until it is imported or undone.
CREATE TABLE import_file (
  batch_id TEXT PRIMARY KEY REFERENCES import_batch (id),
  content BLOB,
  sheets_json TEXT CHECK (sheets_json IS NULL OR json_valid(sheets_json)),
  CHECK (content IS NOT NULL OR sheets_json IS NOT NULL)
) STRICT;

-- Every row that an import made, in the order in which it was made, with a hash of how it was left.
CREATE TABLE import_made (
  batch_id TEXT NOT NULL REFERENCES import_batch (id),
  order_no INTEGER NOT NULL,
  table_name TEXT NOT NULL,
  row_id TEXT NOT NULL,
  sheet TEXT NOT NULL,
  row_no INTEGER NOT NULL,
  row_hash TEXT NOT NULL,
  PRIMARY KEY (batch_id, order_no)
) STRICT, WITHOUT ROWID;
CREATE INDEX import_made_row ON import_made (table_name, row_id);

CREATE INDEX import_row_target ON import_row (target_id) WHERE target_id IS NOT NULL;

-- An answer stays for good, except that one which came with an import goes when that import is undone.
DROP TRIGGER consent_is_kept;
CREATE TRIGGER consent_is_kept BEFORE DELETE ON consent
WHEN NOT EXISTS (
  SELECT 1 FROM import_made m JOIN import_batch b ON b.id = m.batch_id
  WHERE m.table_name = 'consent' AND m.row_id = OLD.id AND b.state = 'imported')
BEGIN SELECT RAISE(ABORT, 'consent_fixed'); END;
