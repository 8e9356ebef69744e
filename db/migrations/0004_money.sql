-- What the school charges, to whom, what was paid, and the rules that keep it true.
-- Money is whole minor units (…_minor). Percentages are basis points (…_bp). Issued documents are never edited: a change is a new row.

CREATE TABLE product (
  id TEXT PRIMARY KEY,
  code TEXT NOT NULL UNIQUE,
  label TEXT NOT NULL,
  kind TEXT NOT NULL CHECK (kind IN (
    'tuition', 'registration', 'trial', 'book', 'recital', 'rental', 'assessment', 'fee', 'package', 'workshop')),
  -- Tuition is priced per kind of lesson.
  lesson_type_id TEXT REFERENCES lesson_type (id),
  tax_class TEXT NOT NULL DEFAULT 'tuition',
  account_code TEXT NOT NULL DEFAULT 'income',
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'retired')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

-- The most specific row in force on the day wins: site and length, then length, then site, then neither.
CREATE TABLE price (
  id TEXT PRIMARY KEY,
  product_id TEXT NOT NULL REFERENCES product (id),
  site_id TEXT REFERENCES site (id),
  length_minutes INTEGER CHECK (length_minutes BETWEEN 5 AND 720),
  amount_minor INTEGER NOT NULL CHECK (amount_minor >= 0),
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE INDEX price_product ON price (product_id, valid_from);
CREATE TRIGGER price_does_not_overlap BEFORE INSERT ON price
WHEN EXISTS (
  SELECT 1 FROM price p WHERE p.product_id = NEW.product_id AND p.site_id IS NEW.site_id AND p.length_minutes IS NEW.length_minutes
  AND p.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(p.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'price_overlap'); END;
CREATE TRIGGER price_change_does_not_overlap BEFORE UPDATE ON price
WHEN EXISTS (
  SELECT 1 FROM price p WHERE p.id <> NEW.id AND p.product_id = NEW.product_id AND p.site_id IS NEW.site_id AND p.length_minutes IS NEW.length_minutes
  AND p.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(p.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'price_overlap'); END;

-- How a class of goods is taxed by one legal entity. An exempt line must say why (EN 16931, BR-E-10).
CREATE TABLE tax_rate (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  tax_class TEXT NOT NULL,
  treatment TEXT NOT NULL CHECK (treatment IN ('taxed', 'zero', 'exempt')),
  rate_bp INTEGER NOT NULL DEFAULT 0 CHECK (rate_bp BETWEEN 0 AND 10000),
  exemption_reason TEXT NOT NULL DEFAULT '',
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  CHECK (treatment = 'taxed' OR rate_bp = 0),
  CHECK (treatment <> 'exempt' OR length(trim(exemption_reason)) > 0),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE TRIGGER tax_rate_does_not_overlap BEFORE INSERT ON tax_rate
WHEN EXISTS (
  SELECT 1 FROM tax_rate t WHERE t.legal_entity_id = NEW.legal_entity_id AND t.tax_class = NEW.tax_class
  AND t.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(t.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'tax_rate_overlap'); END;

-- The account that is billed, in one currency.
CREATE TABLE family (
  id TEXT PRIMARY KEY,
  name TEXT NOT NULL CHECK (length(trim(name)) > 0),
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  currency TEXT NOT NULL CHECK (length(currency) = 3),
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'closed')),
  note_private TEXT NOT NULL DEFAULT '',
  external_key TEXT UNIQUE,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX family_name ON family (name);

CREATE TABLE family_student (
  family_id TEXT NOT NULL REFERENCES family (id),
  student_id TEXT NOT NULL REFERENCES person (id),
  from_on TEXT NOT NULL DEFAULT '2000-01-01',
  to_on TEXT,
  PRIMARY KEY (family_id, student_id)
) STRICT, WITHOUT ROWID;
CREATE INDEX family_student_of ON family_student (student_id);

-- A person or organisation that pays a share. Payers of one family never see each other's address, share or payments.
CREATE TABLE payer (
  id TEXT PRIMARY KEY,
  family_id TEXT NOT NULL REFERENCES family (id),
  person_id TEXT REFERENCES person (id),
  organisation_name TEXT,
  -- For an organisation; a person's address is their primary e-mail.
  billing_email TEXT,
  billing_address TEXT NOT NULL DEFAULT '',
  purchase_order_no TEXT,
  -- Nothing of a card is kept but what a receipt may show.
  processor_customer_id TEXT UNIQUE,
  card_brand TEXT,
  card_last4 TEXT CHECK (card_last4 IS NULL OR length(card_last4) = 4),
  is_autopay INTEGER NOT NULL DEFAULT 0 CHECK (is_autopay IN (0, 1)),
  order_no INTEGER NOT NULL DEFAULT 1,
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'left')),
  external_key TEXT UNIQUE,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((person_id IS NULL) <> (organisation_name IS NULL)),
  UNIQUE (family_id, person_id)
) STRICT;
CREATE INDEX payer_person ON payer (person_id);
CREATE INDEX payer_family ON payer (family_id, order_no);

-- Who pays what. parts_json: percent [{payerId, bp}], whole [{payerId}], fixed_then_rest [{payerId, amountMinor}] with the rest to remainder_payer_id.
CREATE TABLE split_rule (
  id TEXT PRIMARY KEY,
  family_id TEXT NOT NULL REFERENCES family (id),
  -- A kind of charge, or '*' for everything that has no rule of its own.
  charge_kind TEXT NOT NULL DEFAULT '*',
  method TEXT NOT NULL CHECK (method IN ('percent', 'whole', 'fixed_then_rest')),
  parts_json TEXT NOT NULL CHECK (json_valid(parts_json) AND json_array_length(parts_json) > 0),
  remainder_payer_id TEXT REFERENCES payer (id),
  valid_from TEXT NOT NULL DEFAULT '2000-01-01',
  valid_to TEXT,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (method <> 'fixed_then_rest' OR remainder_payer_id IS NOT NULL),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE INDEX split_rule_family ON split_rule (family_id);
CREATE TRIGGER split_rule_is_whole BEFORE INSERT ON split_rule
WHEN NEW.method = 'percent' AND (SELECT coalesce(sum(json_extract(value, '$.bp')), 0) FROM json_each(NEW.parts_json)) <> 10000
BEGIN SELECT RAISE(ABORT, 'split_not_whole'); END;
CREATE TRIGGER split_rule_names_own_payers BEFORE INSERT ON split_rule
WHEN EXISTS (
  SELECT 1 FROM json_each(NEW.parts_json) part
  WHERE NOT EXISTS (SELECT 1 FROM payer p WHERE p.id = json_extract(part.value, '$.payerId') AND p.family_id = NEW.family_id))
BEGIN SELECT RAISE(ABORT, 'split_foreign_payer'); END;
CREATE TRIGGER split_rule_does_not_overlap BEFORE INSERT ON split_rule
WHEN EXISTS (
  SELECT 1 FROM split_rule s WHERE s.family_id = NEW.family_id AND s.charge_kind = NEW.charge_kind
  AND s.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(s.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'split_overlap'); END;
CREATE TRIGGER split_rule_is_followed BEFORE UPDATE OF family_id, charge_kind, method, parts_json, remainder_payer_id, valid_from ON split_rule
BEGIN SELECT RAISE(ABORT, 'split_fixed'); END;

-- second_child: every student of the family except the one with the highest gross. multi_lesson: second and later enrolments of one student.
CREATE TABLE discount_rule (
  id TEXT PRIMARY KEY,
  code TEXT NOT NULL,
  label TEXT NOT NULL,
  qualifies TEXT NOT NULL CHECK (qualifies IN ('second_child', 'multi_lesson', 'family')),
  family_id TEXT REFERENCES family (id),
  charge_kind TEXT NOT NULL DEFAULT 'tuition',
  rate_bp INTEGER NOT NULL CHECK (rate_bp BETWEEN 1 AND 10000),
  order_no INTEGER NOT NULL,
  stacking_group TEXT NOT NULL DEFAULT 'automatic',
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((qualifies = 'family') = (family_id IS NOT NULL)),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE TRIGGER discount_rule_does_not_overlap BEFORE INSERT ON discount_rule
WHEN EXISTS (
  SELECT 1 FROM discount_rule d WHERE d.code = NEW.code AND d.family_id IS NEW.family_id
  AND d.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(d.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'discount_overlap'); END;

CREATE TABLE scholarship_fund (
  id TEXT PRIMARY KEY,
  name TEXT NOT NULL UNIQUE,
  budget_minor INTEGER NOT NULL CHECK (budget_minor >= 0),
  starts_on TEXT NOT NULL,
  ends_on TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

-- Confidential: teachers and other payers never see that there is one.
CREATE TABLE scholarship_award (
  id TEXT PRIMARY KEY,
  fund_id TEXT NOT NULL REFERENCES scholarship_fund (id),
  student_id TEXT NOT NULL REFERENCES person (id),
  enrolment_id TEXT REFERENCES enrolment (id),
  rate_bp INTEGER NOT NULL CHECK (rate_bp BETWEEN 1 AND 10000),
  committed_minor INTEGER NOT NULL DEFAULT 0 CHECK (committed_minor >= 0),
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE INDEX scholarship_award_student ON scholarship_award (student_id);
CREATE TRIGGER scholarship_within_budget BEFORE INSERT ON scholarship_award
WHEN (SELECT coalesce(sum(a.committed_minor), 0) FROM scholarship_award a WHERE a.fund_id = NEW.fund_id) + NEW.committed_minor
  > (SELECT f.budget_minor FROM scholarship_fund f WHERE f.id = NEW.fund_id)
BEGIN SELECT RAISE(ABORT, 'fund_exceeded'); END;

-- Numbers are taken in the transaction that issues the document, so a failed one leaves no hole (VAT Directive 2006/112 Art. 226(2)).
CREATE TABLE number_series (
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  kind TEXT NOT NULL CHECK (kind IN ('invoice', 'credit_note', 'receipt', 'refund', 'statement', 'year_statement', 'pay_statement', 'export')),
  prefix TEXT NOT NULL DEFAULT '',
  first_no INTEGER NOT NULL DEFAULT 1 CHECK (first_no > 0),
  next_no INTEGER NOT NULL DEFAULT 1,
  PRIMARY KEY (legal_entity_id, kind),
  CHECK (next_no >= first_no)
) STRICT, WITHOUT ROWID;
CREATE TRIGGER number_series_counts_by_one BEFORE UPDATE OF next_no ON number_series
WHEN NEW.next_no <> OLD.next_no + 1
BEGIN SELECT RAISE(ABORT, 'number_gap'); END;
CREATE TRIGGER number_series_is_kept BEFORE DELETE ON number_series BEGIN SELECT RAISE(ABORT, 'number_gap'); END;

CREATE TABLE tuition_run (
  id TEXT PRIMARY KEY,
  label TEXT NOT NULL,
  kind TEXT NOT NULL CHECK (kind IN ('term', 'month')),
  term_id TEXT REFERENCES term (id),
  period_from TEXT NOT NULL,
  period_to TEXT NOT NULL,
  issued_on TEXT NOT NULL,
  due_on TEXT NOT NULL,
  -- {instalments, depositBp, movesToWorkingDay}
  plan_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(plan_json)),
  state TEXT NOT NULL DEFAULT 'preview' CHECK (state IN ('preview', 'releasing', 'released', 'dropped')),
  control_total_minor INTEGER NOT NULL DEFAULT 0,
  previewed_at INTEGER,
  released_by TEXT REFERENCES person (id),
  released_at INTEGER,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (period_from <= period_to),
  CHECK ((kind = 'term') = (term_id IS NOT NULL)),
  CHECK ((state = 'released') = (released_at IS NOT NULL))
) STRICT;
CREATE UNIQUE INDEX tuition_run_one_open ON tuition_run (kind, period_from) WHERE state IN ('preview', 'releasing');
CREATE TRIGGER tuition_run_is_fixed BEFORE UPDATE ON tuition_run
WHEN OLD.state IN ('released', 'dropped')
BEGIN SELECT RAISE(ABORT, 'run_fixed'); END;

-- bill_json is the whole worked-out bill, so that what was looked at is what is released.
CREATE TABLE tuition_run_item (
  id TEXT PRIMARY KEY,
  run_id TEXT NOT NULL REFERENCES tuition_run (id),
  family_id TEXT NOT NULL REFERENCES family (id),
  state TEXT NOT NULL DEFAULT 'planned' CHECK (state IN ('planned', 'held', 'problem', 'released', 'gone')),
  total_minor INTEGER NOT NULL DEFAULT 0,
  last_total_minor INTEGER,
  change_kind TEXT NOT NULL DEFAULT 'same' CHECK (change_kind IN ('new', 'gone', 'changed', 'same')),
  change_text TEXT NOT NULL DEFAULT '',
  problem TEXT NOT NULL DEFAULT '',
  held_reason TEXT NOT NULL DEFAULT '',
  held_by TEXT REFERENCES person (id),
  held_at INTEGER,
  bill_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(bill_json)),
  invoice_id TEXT REFERENCES invoice (id),
  UNIQUE (run_id, family_id),
  CHECK ((state = 'released') = (invoice_id IS NOT NULL)),
  CHECK (state <> 'held' OR length(trim(held_reason)) > 0)
) STRICT;
CREATE TRIGGER tuition_run_item_is_fixed BEFORE UPDATE ON tuition_run_item
WHEN OLD.state = 'released'
BEGIN SELECT RAISE(ABORT, 'run_fixed'); END;
CREATE TRIGGER tuition_run_item_is_kept BEFORE DELETE ON tuition_run_item
WHEN OLD.state = 'released'
BEGIN SELECT RAISE(ABORT, 'run_fixed'); END;

-- Whether it is paid, overdue or credited is worked out from allocations, never written here: an issued invoice does not change.
CREATE TABLE invoice (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  family_id TEXT NOT NULL REFERENCES family (id),
  tuition_run_id TEXT REFERENCES tuition_run (id),
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'issued', 'dropped')),
  sequence_no INTEGER,
  document_no TEXT,
  label TEXT NOT NULL DEFAULT '',
  issued_on TEXT,
  due_on TEXT,
  currency TEXT NOT NULL,
  net_minor INTEGER NOT NULL DEFAULT 0,
  tax_minor INTEGER NOT NULL DEFAULT 0,
  total_minor INTEGER NOT NULL DEFAULT 0,
  -- Seller and family as they were on the day: names and addresses change, the document does not.
  seller_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(seller_json)),
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((state = 'issued') = (sequence_no IS NOT NULL)),
  CHECK (state <> 'issued' OR (document_no IS NOT NULL AND issued_on IS NOT NULL AND due_on IS NOT NULL)),
  CHECK (total_minor = net_minor + tax_minor)
) STRICT;
CREATE UNIQUE INDEX invoice_number ON invoice (legal_entity_id, sequence_no) WHERE sequence_no IS NOT NULL;
CREATE UNIQUE INDEX invoice_document_no ON invoice (legal_entity_id, document_no) WHERE document_no IS NOT NULL;
CREATE UNIQUE INDEX invoice_once_per_run ON invoice (tuition_run_id, family_id) WHERE tuition_run_id IS NOT NULL AND state <> 'dropped';
CREATE INDEX invoice_family ON invoice (family_id, issued_on);

CREATE TABLE invoice_line (
  id TEXT PRIMARY KEY,
  invoice_id TEXT NOT NULL REFERENCES invoice (id),
  line_no INTEGER NOT NULL CHECK (line_no > 0),
  charge_kind TEXT NOT NULL,
  product_id TEXT REFERENCES product (id),
  enrolment_id TEXT REFERENCES enrolment (id),
  student_id TEXT REFERENCES person (id),
  text TEXT NOT NULL CHECK (length(trim(text)) > 0),
  quantity INTEGER NOT NULL DEFAULT 1,
  unit_minor INTEGER NOT NULL,
  gross_minor INTEGER NOT NULL,
  net_minor INTEGER NOT NULL,
  tax_treatment TEXT NOT NULL CHECK (tax_treatment IN ('taxed', 'zero', 'exempt')),
  tax_bp INTEGER NOT NULL DEFAULT 0 CHECK (tax_bp BETWEEN 0 AND 10000),
  -- This line's part of its rate group's tax (which is worked out once, on the group's sum).
  tax_minor INTEGER NOT NULL DEFAULT 0,
  account_code TEXT NOT NULL DEFAULT 'income',
  service_from TEXT,
  service_to TEXT,
  explain_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(explain_json)),
  UNIQUE (invoice_id, line_no)
) STRICT;
CREATE INDEX invoice_line_enrolment ON invoice_line (enrolment_id, service_from);
CREATE INDEX invoice_line_student ON invoice_line (student_id, charge_kind);

-- How the net of a line came about, one row per step; the last `after` is the net.
CREATE TABLE line_step (
  invoice_line_id TEXT NOT NULL REFERENCES invoice_line (id),
  order_no INTEGER NOT NULL CHECK (order_no > 0),
  label TEXT NOT NULL,
  sentence TEXT NOT NULL,
  discount_rule_id TEXT REFERENCES discount_rule (id),
  scholarship_award_id TEXT REFERENCES scholarship_award (id),
  before_minor INTEGER NOT NULL,
  change_minor INTEGER NOT NULL,
  after_minor INTEGER NOT NULL,
  PRIMARY KEY (invoice_line_id, order_no),
  CHECK (before_minor + change_minor = after_minor)
) STRICT, WITHOUT ROWID;

-- Lessons charged one by one: each is billed once.
CREATE TABLE invoice_line_seat (
  seat_id TEXT PRIMARY KEY REFERENCES seat (id),
  invoice_line_id TEXT NOT NULL REFERENCES invoice_line (id)
) STRICT, WITHOUT ROWID;
CREATE INDEX invoice_line_seat_line ON invoice_line_seat (invoice_line_id);

-- Tax by rate group: rounded once on the group's sum (EN 16931, BR-CO-17).
CREATE TABLE invoice_tax (
  invoice_id TEXT NOT NULL REFERENCES invoice (id),
  treatment TEXT NOT NULL CHECK (treatment IN ('taxed', 'zero', 'exempt')),
  rate_bp INTEGER NOT NULL,
  net_minor INTEGER NOT NULL,
  tax_minor INTEGER NOT NULL,
  reason TEXT NOT NULL DEFAULT '',
  PRIMARY KEY (invoice_id, treatment, rate_bp)
) STRICT, WITHOUT ROWID;

CREATE TABLE invoice_share (
  id TEXT PRIMARY KEY,
  invoice_id TEXT NOT NULL REFERENCES invoice (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  amount_minor INTEGER NOT NULL,
  -- The payer as written on the document.
  payer_name TEXT NOT NULL,
  payer_address TEXT NOT NULL DEFAULT '',
  UNIQUE (invoice_id, payer_id)
) STRICT;
CREATE INDEX invoice_share_payer ON invoice_share (payer_id);

-- A payer's part of each kind of charge, with the sentence that says how it was cut.
CREATE TABLE invoice_share_part (
  share_id TEXT NOT NULL REFERENCES invoice_share (id),
  charge_kind TEXT NOT NULL,
  whole_minor INTEGER NOT NULL,
  amount_minor INTEGER NOT NULL,
  share_bp INTEGER,
  sentence TEXT NOT NULL,
  PRIMARY KEY (share_id, charge_kind)
) STRICT, WITHOUT ROWID;

-- A changed plan is a new version; the old rows stay with the day they were replaced.
CREATE TABLE instalment (
  id TEXT PRIMARY KEY,
  share_id TEXT NOT NULL REFERENCES invoice_share (id),
  version_no INTEGER NOT NULL DEFAULT 1,
  instalment_no INTEGER NOT NULL CHECK (instalment_no > 0),
  due_on TEXT NOT NULL,
  amount_minor INTEGER NOT NULL,
  replaced_at INTEGER,
  UNIQUE (share_id, version_no, instalment_no)
) STRICT;
CREATE INDEX instalment_due ON instalment (due_on);

CREATE TABLE payout (
  id TEXT PRIMARY KEY,
  arrived_on TEXT NOT NULL,
  gross_minor INTEGER NOT NULL,
  fee_minor INTEGER NOT NULL DEFAULT 0,
  refund_minor INTEGER NOT NULL DEFAULT 0,
  net_minor INTEGER NOT NULL,
  external_key TEXT NOT NULL UNIQUE,
  matched_at INTEGER,
  CHECK (net_minor = gross_minor - fee_minor - refund_minor)
) STRICT;

CREATE TABLE payment (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  currency TEXT NOT NULL,
  method TEXT NOT NULL CHECK (method IN ('card', 'cash', 'transfer', 'cheque', 'opening')),
  received_on TEXT NOT NULL,
  received_at INTEGER NOT NULL,
  state TEXT NOT NULL DEFAULT 'received' CHECK (state IN ('received', 'disputed', 'returned')),
  -- What makes a repeat harmless: the processor's payment, or the form that was sent.
  external_key TEXT UNIQUE,
  receipt_no INTEGER,
  receipt_document_no TEXT,
  card_brand TEXT,
  card_last4 TEXT CHECK (card_last4 IS NULL OR length(card_last4) = 4),
  site_id TEXT REFERENCES site (id),
  note TEXT NOT NULL DEFAULT '',
  payout_id TEXT REFERENCES payout (id),
  taken_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX payment_payer ON payment (payer_id, received_on);
CREATE INDEX payment_received ON payment (received_on);
CREATE UNIQUE INDEX payment_receipt ON payment (legal_entity_id, receipt_no) WHERE receipt_no IS NOT NULL;
CREATE TRIGGER payment_receipts_have_no_gap BEFORE INSERT ON payment
WHEN NEW.receipt_no IS NOT NULL AND NEW.receipt_no <> coalesce(
  (SELECT max(p.receipt_no) FROM payment p WHERE p.legal_entity_id = NEW.legal_entity_id),
  (SELECT s.first_no - 1 FROM number_series s WHERE s.legal_entity_id = NEW.legal_entity_id AND s.kind = 'receipt'), 0) + 1
BEGIN SELECT RAISE(ABORT, 'number_gap'); END;
CREATE TRIGGER payment_is_fixed BEFORE UPDATE OF legal_entity_id, payer_id, amount_minor, currency, method, received_on, external_key, receipt_no ON payment
BEGIN SELECT RAISE(ABORT, 'payment_fixed'); END;
CREATE TRIGGER payment_is_kept BEFORE DELETE ON payment BEGIN SELECT RAISE(ABORT, 'payment_fixed'); END;

-- One try at a card payment. The key is stored before the processor is called, so a crash in between cannot charge twice.
CREATE TABLE payment_attempt (
  id TEXT PRIMARY KEY,
  invoice_id TEXT NOT NULL REFERENCES invoice (id),
  share_id TEXT NOT NULL REFERENCES invoice_share (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  try_no INTEGER NOT NULL CHECK (try_no > 0),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  idempotency_key TEXT NOT NULL UNIQUE,
  session_id TEXT UNIQUE,
  intent_id TEXT,
  hosted_url TEXT,
  expires_at INTEGER,
  state TEXT NOT NULL DEFAULT 'started' CHECK (state IN ('started', 'waiting', 'failed', 'expired', 'paid')),
  reason TEXT NOT NULL DEFAULT '',
  payment_id TEXT REFERENCES payment (id),
  started_by TEXT REFERENCES person (id),
  started_at INTEGER NOT NULL,
  settled_at INTEGER,
  UNIQUE (invoice_id, try_no),
  CHECK ((state = 'paid') = (payment_id IS NOT NULL))
) STRICT;
CREATE INDEX payment_attempt_share ON payment_attempt (share_id, state);
CREATE TRIGGER payment_attempt_only_forward BEFORE UPDATE OF state ON payment_attempt
WHEN OLD.state = 'paid' AND NEW.state <> 'paid'
BEGIN SELECT RAISE(ABORT, 'attempt_backward'); END;
CREATE TRIGGER payment_attempt_is_kept BEFORE DELETE ON payment_attempt BEGIN SELECT RAISE(ABORT, 'attempt_fixed'); END;

-- The same event twice changes nothing the second time.
CREATE TABLE external_event (
  source TEXT NOT NULL,
  event_id TEXT NOT NULL,
  type TEXT NOT NULL,
  body_sha256 TEXT NOT NULL,
  effect TEXT NOT NULL DEFAULT '',
  processed_at INTEGER NOT NULL,
  PRIMARY KEY (source, event_id)
) STRICT, WITHOUT ROWID;
CREATE TRIGGER external_event_is_fixed BEFORE UPDATE ON external_event BEGIN SELECT RAISE(ABORT, 'event_fixed'); END;
CREATE TRIGGER external_event_is_kept BEFORE DELETE ON external_event BEGIN SELECT RAISE(ABORT, 'event_fixed'); END;

-- A credit note is a document of its own that names the invoice it corrects (VAT Directive 2006/112 Art. 219).
CREATE TABLE credit_note (
  id TEXT PRIMARY KEY,
  invoice_id TEXT NOT NULL REFERENCES invoice (id),
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'issued')),
  sequence_no INTEGER,
  document_no TEXT,
  reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
  issued_on TEXT,
  net_minor INTEGER NOT NULL DEFAULT 0 CHECK (net_minor >= 0),
  tax_minor INTEGER NOT NULL DEFAULT 0 CHECK (tax_minor >= 0),
  total_minor INTEGER NOT NULL DEFAULT 0,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (total_minor = net_minor + tax_minor),
  CHECK ((state = 'issued') = (sequence_no IS NOT NULL AND issued_on IS NOT NULL AND document_no IS NOT NULL))
) STRICT;
CREATE UNIQUE INDEX credit_note_number ON credit_note (legal_entity_id, sequence_no) WHERE sequence_no IS NOT NULL;
CREATE INDEX credit_note_invoice ON credit_note (invoice_id);

CREATE TABLE credit_note_line (
  id TEXT PRIMARY KEY,
  credit_note_id TEXT NOT NULL REFERENCES credit_note (id),
  invoice_line_id TEXT NOT NULL REFERENCES invoice_line (id),
  net_minor INTEGER NOT NULL CHECK (net_minor >= 0),
  tax_minor INTEGER NOT NULL DEFAULT 0 CHECK (tax_minor >= 0),
  sentence TEXT NOT NULL,
  UNIQUE (credit_note_id, invoice_line_id)
) STRICT;
CREATE INDEX credit_note_line_of ON credit_note_line (invoice_line_id);
CREATE TRIGGER credit_never_exceeds_line BEFORE INSERT ON credit_note_line
WHEN (SELECT coalesce(sum(c.net_minor), 0) FROM credit_note_line c WHERE c.invoice_line_id = NEW.invoice_line_id) + NEW.net_minor
  > (SELECT l.net_minor FROM invoice_line l WHERE l.id = NEW.invoice_line_id)
BEGIN SELECT RAISE(ABORT, 'credit_over_line'); END;
CREATE TRIGGER credit_tax_never_exceeds_line BEFORE INSERT ON credit_note_line
WHEN (SELECT coalesce(sum(c.tax_minor), 0) FROM credit_note_line c WHERE c.invoice_line_id = NEW.invoice_line_id) + NEW.tax_minor
  > (SELECT l.tax_minor FROM invoice_line l WHERE l.id = NEW.invoice_line_id)
BEGIN SELECT RAISE(ABORT, 'credit_over_line'); END;
CREATE TRIGGER credit_names_its_own_invoice BEFORE INSERT ON credit_note_line
WHEN (SELECT l.invoice_id FROM invoice_line l WHERE l.id = NEW.invoice_line_id) <> (SELECT c.invoice_id FROM credit_note c WHERE c.id = NEW.credit_note_id)
BEGIN SELECT RAISE(ABORT, 'credit_foreign_line'); END;

CREATE TABLE credit_note_share (
  id TEXT PRIMARY KEY,
  credit_note_id TEXT NOT NULL REFERENCES credit_note (id),
  share_id TEXT NOT NULL REFERENCES invoice_share (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor >= 0),
  UNIQUE (credit_note_id, share_id)
) STRICT;
CREATE INDEX credit_note_share_payer ON credit_note_share (payer_id);
CREATE TRIGGER credit_never_exceeds_share BEFORE INSERT ON credit_note_share
WHEN (SELECT coalesce(sum(c.amount_minor), 0) FROM credit_note_share c WHERE c.share_id = NEW.share_id) + NEW.amount_minor
  > (SELECT s.amount_minor FROM invoice_share s WHERE s.id = NEW.share_id)
BEGIN SELECT RAISE(ABORT, 'credit_over_share'); END;

CREATE TABLE late_fee (
  id TEXT PRIMARY KEY,
  instalment_id TEXT NOT NULL REFERENCES instalment (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  seq_no INTEGER NOT NULL CHECK (seq_no > 0),
  computed_on TEXT NOT NULL,
  base_minor INTEGER NOT NULL CHECK (base_minor > 0),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  sentence TEXT NOT NULL,
  waived_on TEXT,
  waived_by TEXT REFERENCES person (id),
  waived_reason TEXT,
  UNIQUE (instalment_id, seq_no),
  CHECK (waived_on IS NULL OR length(trim(waived_reason)) > 0)
) STRICT;
CREATE TRIGGER late_fee_is_fixed BEFORE UPDATE OF instalment_id, payer_id, seq_no, computed_on, base_minor, amount_minor ON late_fee
BEGIN SELECT RAISE(ABORT, 'late_fee_fixed'); END;
CREATE TRIGGER late_fee_is_kept BEFORE DELETE ON late_fee BEGIN SELECT RAISE(ABORT, 'late_fee_fixed'); END;

CREATE TABLE refund (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  payer_id TEXT NOT NULL REFERENCES payer (id),
  -- Money goes back the way it came.
  payment_id TEXT NOT NULL REFERENCES payment (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  method TEXT NOT NULL CHECK (method IN ('card', 'cash', 'transfer', 'cheque')),
  sequence_no INTEGER,
  document_no TEXT,
  idempotency_key TEXT UNIQUE,
  processor_refund_id TEXT UNIQUE,
  reason TEXT NOT NULL DEFAULT '',
  state TEXT NOT NULL DEFAULT 'started' CHECK (state IN ('started', 'sent', 'failed')),
  sent_on TEXT,
  made_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((state = 'sent') = (sent_on IS NOT NULL))
) STRICT;
CREATE UNIQUE INDEX refund_number ON refund (legal_entity_id, sequence_no) WHERE sequence_no IS NOT NULL;
CREATE INDEX refund_payment ON refund (payment_id);
CREATE INDEX refund_payer ON refund (payer_id);
CREATE TRIGGER refund_never_exceeds_payment BEFORE INSERT ON refund
WHEN (SELECT coalesce(sum(r.amount_minor), 0) FROM refund r WHERE r.payment_id = NEW.payment_id AND r.state <> 'failed') + NEW.amount_minor
  > (SELECT p.amount_minor FROM payment p WHERE p.id = NEW.payment_id AND p.payer_id = NEW.payer_id)
BEGIN SELECT RAISE(ABORT, 'refund_over_payment'); END;
CREATE TRIGGER refund_is_fixed BEFORE UPDATE ON refund
WHEN OLD.state IN ('sent', 'failed')
BEGIN SELECT RAISE(ABORT, 'refund_fixed'); END;
CREATE TRIGGER refund_amount_is_fixed BEFORE UPDATE OF amount_minor, payment_id, payer_id ON refund BEGIN SELECT RAISE(ABORT, 'refund_fixed'); END;
CREATE TRIGGER refund_is_kept BEFORE DELETE ON refund BEGIN SELECT RAISE(ABORT, 'refund_fixed'); END;

-- What a payment or a credit settles. Reversed, never deleted: the state of any past day can be worked out again.
CREATE TABLE allocation (
  id TEXT PRIMARY KEY,
  payer_id TEXT NOT NULL REFERENCES payer (id),
  payment_id TEXT REFERENCES payment (id),
  credit_note_share_id TEXT REFERENCES credit_note_share (id),
  instalment_id TEXT REFERENCES instalment (id),
  late_fee_id TEXT REFERENCES late_fee (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  made_on TEXT NOT NULL,
  sentence TEXT NOT NULL DEFAULT '',
  reversed_on TEXT,
  reversed_reason TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((payment_id IS NULL) <> (credit_note_share_id IS NULL)),
  CHECK ((instalment_id IS NULL) <> (late_fee_id IS NULL))
) STRICT;
CREATE INDEX allocation_payment ON allocation (payment_id) WHERE payment_id IS NOT NULL;
CREATE INDEX allocation_credit ON allocation (credit_note_share_id) WHERE credit_note_share_id IS NOT NULL;
CREATE INDEX allocation_instalment ON allocation (instalment_id) WHERE instalment_id IS NOT NULL;
CREATE INDEX allocation_fee ON allocation (late_fee_id) WHERE late_fee_id IS NOT NULL;
CREATE INDEX allocation_payer ON allocation (payer_id);

-- Payments and credits not yet used, less what went back. A returned payment is no longer money.
CREATE VIEW payer_credit AS
SELECT p.id AS payer_id,
  (SELECT coalesce(sum(x.amount_minor), 0) FROM payment x WHERE x.payer_id = p.id AND x.state <> 'returned')
  + (SELECT coalesce(sum(c.amount_minor), 0) FROM credit_note_share c JOIN credit_note n ON n.id = c.credit_note_id
     WHERE c.payer_id = p.id AND n.state = 'issued')
  - (SELECT coalesce(sum(a.amount_minor), 0) FROM allocation a WHERE a.payer_id = p.id AND a.reversed_on IS NULL)
  - (SELECT coalesce(sum(r.amount_minor), 0) FROM refund r WHERE r.payer_id = p.id AND r.state <> 'failed') AS credit_minor
FROM payer p;

CREATE TRIGGER allocation_within_source BEFORE INSERT ON allocation
WHEN (SELECT coalesce(sum(a.amount_minor), 0) FROM allocation a WHERE a.reversed_on IS NULL
      AND a.payment_id IS NEW.payment_id AND a.credit_note_share_id IS NEW.credit_note_share_id) + NEW.amount_minor
  > coalesce((SELECT p.amount_minor FROM payment p WHERE p.id = NEW.payment_id AND p.payer_id = NEW.payer_id AND p.state <> 'returned'),
             (SELECT c.amount_minor FROM credit_note_share c WHERE c.id = NEW.credit_note_share_id AND c.payer_id = NEW.payer_id), 0)
BEGIN SELECT RAISE(ABORT, 'over_source'); END;
CREATE TRIGGER allocation_within_target BEFORE INSERT ON allocation
WHEN (SELECT coalesce(sum(a.amount_minor), 0) FROM allocation a WHERE a.reversed_on IS NULL
      AND a.instalment_id IS NEW.instalment_id AND a.late_fee_id IS NEW.late_fee_id) + NEW.amount_minor
  > coalesce((SELECT i.amount_minor FROM instalment i JOIN invoice_share s ON s.id = i.share_id
              WHERE i.id = NEW.instalment_id AND s.payer_id = NEW.payer_id AND i.replaced_at IS NULL),
             (SELECT f.amount_minor FROM late_fee f WHERE f.id = NEW.late_fee_id AND f.payer_id = NEW.payer_id AND f.waived_on IS NULL), 0)
BEGIN SELECT RAISE(ABORT, 'over_target'); END;
CREATE TRIGGER allocation_leaves_no_negative_credit BEFORE INSERT ON allocation
WHEN NEW.amount_minor > (SELECT c.credit_minor FROM payer_credit c WHERE c.payer_id = NEW.payer_id)
BEGIN SELECT RAISE(ABORT, 'over_credit'); END;
CREATE TRIGGER refund_leaves_no_negative_credit BEFORE INSERT ON refund
WHEN NEW.amount_minor > (SELECT c.credit_minor FROM payer_credit c WHERE c.payer_id = NEW.payer_id)
BEGIN SELECT RAISE(ABORT, 'over_credit'); END;
CREATE TRIGGER allocation_is_fixed BEFORE UPDATE OF payer_id, payment_id, credit_note_share_id, instalment_id, late_fee_id, amount_minor, made_on ON allocation
BEGIN SELECT RAISE(ABORT, 'allocation_fixed'); END;
CREATE TRIGGER allocation_is_reversed_once BEFORE UPDATE OF reversed_on ON allocation
WHEN OLD.reversed_on IS NOT NULL
BEGIN SELECT RAISE(ABORT, 'allocation_fixed'); END;
CREATE TRIGGER allocation_is_kept BEFORE DELETE ON allocation BEGIN SELECT RAISE(ABORT, 'allocation_fixed'); END;

-- Issuing: everything must add up, and the number follows the one before it.
CREATE TRIGGER invoice_adds_up BEFORE UPDATE OF state ON invoice
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND (
  (SELECT coalesce(sum(l.net_minor), 0) FROM invoice_line l WHERE l.invoice_id = NEW.id) <> NEW.net_minor
  OR (SELECT coalesce(sum(l.tax_minor), 0) FROM invoice_line l WHERE l.invoice_id = NEW.id) <> NEW.tax_minor
  OR (SELECT coalesce(sum(t.net_minor), 0) FROM invoice_tax t WHERE t.invoice_id = NEW.id) <> NEW.net_minor
  OR (SELECT coalesce(sum(t.tax_minor), 0) FROM invoice_tax t WHERE t.invoice_id = NEW.id) <> NEW.tax_minor
  OR (SELECT coalesce(sum(s.amount_minor), 0) FROM invoice_share s WHERE s.invoice_id = NEW.id) <> NEW.total_minor
  OR NOT EXISTS (SELECT 1 FROM invoice_line l WHERE l.invoice_id = NEW.id))
BEGIN SELECT RAISE(ABORT, 'invoice_does_not_add_up'); END;
CREATE TRIGGER invoice_shares_add_up BEFORE UPDATE OF state ON invoice
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND EXISTS (
  SELECT 1 FROM invoice_share s WHERE s.invoice_id = NEW.id AND (
    s.amount_minor <> (SELECT coalesce(sum(i.amount_minor), 0) FROM instalment i WHERE i.share_id = s.id AND i.replaced_at IS NULL)
    OR s.amount_minor <> (SELECT coalesce(sum(p.amount_minor), 0) FROM invoice_share_part p WHERE p.share_id = s.id)))
BEGIN SELECT RAISE(ABORT, 'shares_do_not_add_up'); END;
CREATE TRIGGER invoice_steps_end_at_net BEFORE UPDATE OF state ON invoice
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND EXISTS (
  SELECT 1 FROM invoice_line l WHERE l.invoice_id = NEW.id AND l.net_minor <> coalesce(
    (SELECT s.after_minor FROM line_step s WHERE s.invoice_line_id = l.id ORDER BY s.order_no DESC LIMIT 1), l.gross_minor))
BEGIN SELECT RAISE(ABORT, 'steps_do_not_add_up'); END;
CREATE TRIGGER invoice_numbers_have_no_gap BEFORE UPDATE OF state ON invoice
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND NEW.sequence_no <> coalesce(
  (SELECT max(i.sequence_no) FROM invoice i WHERE i.legal_entity_id = NEW.legal_entity_id),
  (SELECT s.first_no - 1 FROM number_series s WHERE s.legal_entity_id = NEW.legal_entity_id AND s.kind = 'invoice'), 0) + 1
BEGIN SELECT RAISE(ABORT, 'number_gap'); END;
CREATE TRIGGER invoice_is_born_a_draft BEFORE INSERT ON invoice
WHEN NEW.state <> 'draft'
BEGIN SELECT RAISE(ABORT, 'invoice_not_draft'); END;
CREATE TRIGGER invoice_is_fixed BEFORE UPDATE ON invoice
WHEN OLD.state <> 'draft'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_is_kept BEFORE DELETE ON invoice
WHEN OLD.state = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER credit_note_adds_up BEFORE UPDATE OF state ON credit_note
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND (
  (SELECT coalesce(sum(l.net_minor), 0) FROM credit_note_line l WHERE l.credit_note_id = NEW.id) <> NEW.net_minor
  OR (SELECT coalesce(sum(l.tax_minor), 0) FROM credit_note_line l WHERE l.credit_note_id = NEW.id) <> NEW.tax_minor
  OR (SELECT coalesce(sum(s.amount_minor), 0) FROM credit_note_share s WHERE s.credit_note_id = NEW.id) <> NEW.total_minor)
BEGIN SELECT RAISE(ABORT, 'credit_does_not_add_up'); END;
CREATE TRIGGER credit_note_numbers_have_no_gap BEFORE UPDATE OF state ON credit_note
WHEN NEW.state = 'issued' AND OLD.state <> 'issued' AND NEW.sequence_no <> coalesce(
  (SELECT max(c.sequence_no) FROM credit_note c WHERE c.legal_entity_id = NEW.legal_entity_id),
  (SELECT s.first_no - 1 FROM number_series s WHERE s.legal_entity_id = NEW.legal_entity_id AND s.kind = 'credit_note'), 0) + 1
BEGIN SELECT RAISE(ABORT, 'number_gap'); END;
CREATE TRIGGER credit_note_is_born_a_draft BEFORE INSERT ON credit_note
WHEN NEW.state <> 'draft'
BEGIN SELECT RAISE(ABORT, 'credit_note_not_draft'); END;
CREATE TRIGGER credit_note_is_fixed BEFORE UPDATE ON credit_note
WHEN OLD.state = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_is_kept BEFORE DELETE ON credit_note
WHEN OLD.state = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;

-- The parts of an issued document are as fixed as the document itself.
CREATE TRIGGER invoice_line_takes_no_more BEFORE INSERT ON invoice_line
WHEN (SELECT i.state FROM invoice i WHERE i.id = NEW.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_line_is_fixed BEFORE UPDATE ON invoice_line
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_line_is_kept BEFORE DELETE ON invoice_line
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_tax_takes_no_more BEFORE INSERT ON invoice_tax
WHEN (SELECT i.state FROM invoice i WHERE i.id = NEW.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_tax_is_fixed BEFORE UPDATE ON invoice_tax
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_tax_is_kept BEFORE DELETE ON invoice_tax
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER line_step_takes_no_more BEFORE INSERT ON line_step
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = NEW.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER line_step_is_fixed BEFORE UPDATE ON line_step
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = OLD.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER line_step_is_kept BEFORE DELETE ON line_step
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = OLD.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_line_seat_takes_no_more BEFORE INSERT ON invoice_line_seat
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = NEW.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_line_seat_is_fixed BEFORE UPDATE ON invoice_line_seat
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = OLD.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_line_seat_is_kept BEFORE DELETE ON invoice_line_seat
WHEN (SELECT i.state FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id WHERE l.id = OLD.invoice_line_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_takes_no_more BEFORE INSERT ON invoice_share
WHEN (SELECT i.state FROM invoice i WHERE i.id = NEW.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_is_fixed BEFORE UPDATE ON invoice_share
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_is_kept BEFORE DELETE ON invoice_share
WHEN (SELECT i.state FROM invoice i WHERE i.id = OLD.invoice_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_part_takes_no_more BEFORE INSERT ON invoice_share_part
WHEN (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = NEW.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_part_is_fixed BEFORE UPDATE ON invoice_share_part
WHEN (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = OLD.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER invoice_share_part_is_kept BEFORE DELETE ON invoice_share_part
WHEN (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = OLD.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER credit_note_line_takes_no_more BEFORE INSERT ON credit_note_line
WHEN (SELECT c.state FROM credit_note c WHERE c.id = NEW.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_line_is_fixed BEFORE UPDATE ON credit_note_line
WHEN (SELECT c.state FROM credit_note c WHERE c.id = OLD.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_line_is_kept BEFORE DELETE ON credit_note_line
WHEN (SELECT c.state FROM credit_note c WHERE c.id = OLD.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_share_takes_no_more BEFORE INSERT ON credit_note_share
WHEN (SELECT c.state FROM credit_note c WHERE c.id = NEW.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_share_is_fixed BEFORE UPDATE ON credit_note_share
WHEN (SELECT c.state FROM credit_note c WHERE c.id = OLD.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER credit_note_share_is_kept BEFORE DELETE ON credit_note_share
WHEN (SELECT c.state FROM credit_note c WHERE c.id = OLD.credit_note_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'credit_note_fixed'); END;
CREATE TRIGGER instalment_takes_no_more BEFORE INSERT ON instalment
WHEN NEW.version_no = 1 AND (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = NEW.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER instalment_within_share BEFORE INSERT ON instalment
WHEN (SELECT s.amount_minor FROM invoice_share s WHERE s.id = NEW.share_id) > 0 AND
  (SELECT coalesce(sum(i.amount_minor), 0) FROM instalment i WHERE i.share_id = NEW.share_id AND i.replaced_at IS NULL) + NEW.amount_minor
  > (SELECT s.amount_minor FROM invoice_share s WHERE s.id = NEW.share_id)
BEGIN SELECT RAISE(ABORT, 'instalments_over_share'); END;
CREATE TRIGGER instalment_is_fixed BEFORE UPDATE OF share_id, version_no, instalment_no, due_on, amount_minor ON instalment
WHEN (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = OLD.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;
CREATE TRIGGER instalment_is_kept BEFORE DELETE ON instalment
WHEN (SELECT i.state FROM invoice_share s JOIN invoice i ON i.id = s.invoice_id WHERE s.id = OLD.share_id) = 'issued'
BEGIN SELECT RAISE(ABORT, 'invoice_fixed'); END;

CREATE TABLE dunning_event (
  id TEXT PRIMARY KEY,
  payer_id TEXT NOT NULL REFERENCES payer (id),
  instalment_id TEXT REFERENCES instalment (id),
  step TEXT NOT NULL CHECK (step IN ('reminder_1', 'reminder_2', 'call', 'plan', 'pause', 'collection', 'hold', 'released')),
  happened_on TEXT NOT NULL,
  channel TEXT NOT NULL DEFAULT 'email' CHECK (channel IN ('email', 'phone', 'post', 'desk', 'none')),
  hold_until_on TEXT,
  reason TEXT NOT NULL DEFAULT '',
  by_id TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (step <> 'hold' OR (hold_until_on IS NOT NULL AND length(trim(reason)) > 0))
) STRICT;
CREATE INDEX dunning_event_payer ON dunning_event (payer_id, happened_on);

CREATE TABLE promise (
  id TEXT PRIMARY KEY,
  payer_id TEXT NOT NULL REFERENCES payer (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  promised_on TEXT NOT NULL,
  pay_by_on TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'kept', 'missed', 'withdrawn')),
  note TEXT NOT NULL DEFAULT '',
  taken_by TEXT REFERENCES person (id)
) STRICT;
CREATE INDEX promise_payer ON promise (payer_id, state);

CREATE TABLE dispute (
  id TEXT PRIMARY KEY,
  payment_id TEXT NOT NULL REFERENCES payment (id),
  opened_on TEXT NOT NULL,
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  fee_minor INTEGER NOT NULL DEFAULT 0,
  external_key TEXT UNIQUE,
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'won', 'lost')),
  settled_on TEXT
) STRICT;

CREATE TABLE write_off (
  id TEXT PRIMARY KEY,
  instalment_id TEXT NOT NULL REFERENCES instalment (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor > 0),
  written_off_on TEXT NOT NULL,
  reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
  approved_by TEXT NOT NULL REFERENCES person (id)
) STRICT;
CREATE TRIGGER write_off_is_fixed BEFORE UPDATE ON write_off BEGIN SELECT RAISE(ABORT, 'write_off_fixed'); END;
CREATE TRIGGER write_off_is_kept BEFORE DELETE ON write_off BEGIN SELECT RAISE(ABORT, 'write_off_fixed'); END;

CREATE TABLE cash_drawer_count (
  id TEXT PRIMARY KEY,
  site_id TEXT NOT NULL REFERENCES site (id),
  counted_on TEXT NOT NULL,
  opening_minor INTEGER NOT NULL,
  expected_minor INTEGER NOT NULL,
  counted_minor INTEGER,
  note TEXT NOT NULL DEFAULT '',
  opened_by TEXT REFERENCES person (id),
  counted_by TEXT REFERENCES person (id),
  UNIQUE (site_id, counted_on)
) STRICT;

CREATE TABLE statement (
  id TEXT PRIMARY KEY,
  payer_id TEXT NOT NULL REFERENCES payer (id),
  as_at_on TEXT NOT NULL,
  from_on TEXT NOT NULL,
  to_on TEXT NOT NULL,
  totals_json TEXT NOT NULL CHECK (json_valid(totals_json)),
  file_id TEXT REFERENCES file (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE year_statement (
  id TEXT PRIMARY KEY,
  payer_id TEXT NOT NULL REFERENCES payer (id),
  tax_year INTEGER NOT NULL,
  sequence_no INTEGER NOT NULL,
  document_no TEXT NOT NULL,
  totals_json TEXT NOT NULL CHECK (json_valid(totals_json)),
  file_id TEXT REFERENCES file (id),
  replaces_id TEXT REFERENCES year_statement (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (payer_id, tax_year, sequence_no)
) STRICT;
CREATE TRIGGER year_statement_is_fixed BEFORE UPDATE ON year_statement BEGIN SELECT RAISE(ABORT, 'year_statement_fixed'); END;

-- Derived from the documents and rebuildable. An entry balances before it is posted, and is mirrored, never changed, afterwards.
CREATE TABLE journal_entry (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  posted_on TEXT NOT NULL,
  document_kind TEXT NOT NULL CHECK (document_kind IN ('invoice', 'credit_note', 'payment', 'refund', 'late_fee', 'write_off', 'earning', 'pay_run', 'reversal')),
  document_id TEXT NOT NULL,
  memo TEXT NOT NULL,
  currency TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'posted')),
  UNIQUE (document_kind, document_id, posted_on)
) STRICT;
CREATE INDEX journal_entry_day ON journal_entry (posted_on);
CREATE TABLE journal_line (
  entry_id TEXT NOT NULL REFERENCES journal_entry (id),
  line_no INTEGER NOT NULL CHECK (line_no > 0),
  account_code TEXT NOT NULL,
  debit_minor INTEGER NOT NULL DEFAULT 0 CHECK (debit_minor >= 0),
  credit_minor INTEGER NOT NULL DEFAULT 0 CHECK (credit_minor >= 0),
  family_id TEXT REFERENCES family (id),
  site_id TEXT REFERENCES site (id),
  PRIMARY KEY (entry_id, line_no),
  CHECK ((debit_minor = 0) <> (credit_minor = 0))
) STRICT, WITHOUT ROWID;
CREATE INDEX journal_line_account ON journal_line (account_code);
CREATE TRIGGER journal_entry_balances BEFORE UPDATE OF state ON journal_entry
WHEN NEW.state = 'posted' AND (SELECT coalesce(sum(l.debit_minor - l.credit_minor), 0) FROM journal_line l WHERE l.entry_id = NEW.id) <> 0
BEGIN SELECT RAISE(ABORT, 'journal_unbalanced'); END;
CREATE TRIGGER journal_entry_is_born_a_draft BEFORE INSERT ON journal_entry WHEN NEW.state <> 'draft' BEGIN SELECT RAISE(ABORT, 'journal_not_draft'); END;
CREATE TRIGGER journal_entry_is_fixed BEFORE UPDATE ON journal_entry WHEN OLD.state = 'posted' BEGIN SELECT RAISE(ABORT, 'journal_fixed'); END;
CREATE TRIGGER journal_entry_is_kept BEFORE DELETE ON journal_entry WHEN OLD.state = 'posted' BEGIN SELECT RAISE(ABORT, 'journal_fixed'); END;
CREATE TRIGGER journal_line_takes_no_more BEFORE INSERT ON journal_line
WHEN (SELECT e.state FROM journal_entry e WHERE e.id = NEW.entry_id) = 'posted' BEGIN SELECT RAISE(ABORT, 'journal_fixed'); END;
CREATE TRIGGER journal_line_is_fixed BEFORE UPDATE ON journal_line
WHEN (SELECT e.state FROM journal_entry e WHERE e.id = OLD.entry_id) = 'posted' BEGIN SELECT RAISE(ABORT, 'journal_fixed'); END;
CREATE TRIGGER journal_line_is_kept BEFORE DELETE ON journal_line
WHEN (SELECT e.state FROM journal_entry e WHERE e.id = OLD.entry_id) = 'posted' BEGIN SELECT RAISE(ABORT, 'journal_fixed'); END;
