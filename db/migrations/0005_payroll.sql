-- What teachers earn: dated rates and rules, the run that is built from marked lessons, and what was said about it. Gross amounts only.

-- The most specific row in force on the day wins; two of equal weight, or none, is an error line, never zero.
CREATE TABLE pay_rate (
  id TEXT PRIMARY KEY,
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  work_type TEXT NOT NULL CHECK (work_type IN (
    'lesson', 'group', 'trial', 'recital', 'rehearsal', 'meeting', 'admin', 'training', 'travel', 'mileage')),
  lesson_type_id TEXT REFERENCES lesson_type (id),
  length_minutes INTEGER CHECK (length_minutes BETWEEN 5 AND 720),
  seats_from INTEGER CHECK (seats_from >= 0),
  seats_to INTEGER,
  site_id TEXT REFERENCES site (id),
  amount_minor INTEGER NOT NULL CHECK (amount_minor >= 0),
  per TEXT NOT NULL CHECK (per IN ('lesson', 'hour', 'mile')),
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (seats_to IS NULL OR (seats_from IS NOT NULL AND seats_from <= seats_to)),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE INDEX pay_rate_engagement ON pay_rate (engagement_id, work_type, valid_from);
CREATE TRIGGER pay_rate_does_not_overlap BEFORE INSERT ON pay_rate
WHEN EXISTS (
  SELECT 1 FROM pay_rate r WHERE r.engagement_id = NEW.engagement_id AND r.work_type = NEW.work_type
  AND r.lesson_type_id IS NEW.lesson_type_id AND r.length_minutes IS NEW.length_minutes AND r.site_id IS NEW.site_id
  AND r.seats_from IS NEW.seats_from AND r.seats_to IS NEW.seats_to
  AND r.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(r.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'pay_rate_overlap'); END;

-- absence {attendance: bp}; substitute {ofAbsentRateBp}; min_visit {minutes}; travel {countsAsWork}; overtime {overMinutes}; rounding {place}.
CREATE TABLE pay_rule (
  id TEXT PRIMARY KEY,
  kind TEXT NOT NULL CHECK (kind IN ('absence', 'substitute', 'min_visit', 'overtime', 'rounding', 'travel')),
  engagement_kind TEXT CHECK (engagement_kind IN ('employee', 'contractor')),
  value_json TEXT NOT NULL CHECK (json_valid(value_json)),
  source_text TEXT NOT NULL DEFAULT '',
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  approved_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE TRIGGER pay_rule_does_not_overlap BEFORE INSERT ON pay_rule
WHEN EXISTS (
  SELECT 1 FROM pay_rule r WHERE r.kind = NEW.kind AND r.engagement_kind IS NEW.engagement_kind
  AND r.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(r.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'pay_rule_overlap'); END;

-- Employees and contractors are paid by separate runs and files.
CREATE TABLE pay_period (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  engagement_kind TEXT NOT NULL CHECK (engagement_kind IN ('employee', 'contractor')),
  label TEXT NOT NULL,
  starts_on TEXT NOT NULL,
  ends_on TEXT NOT NULL,
  pay_on TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_on <= ends_on)
) STRICT;
CREATE TRIGGER pay_period_does_not_overlap BEFORE INSERT ON pay_period
WHEN EXISTS (
  SELECT 1 FROM pay_period p WHERE p.legal_entity_id = NEW.legal_entity_id AND p.engagement_kind = NEW.engagement_kind
  AND p.starts_on <= NEW.ends_on AND NEW.starts_on <= p.ends_on)
BEGIN SELECT RAISE(ABORT, 'pay_period_overlap'); END;

CREATE TABLE time_entry (
  id TEXT PRIMARY KEY,
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  work_type TEXT NOT NULL CHECK (work_type IN ('recital', 'rehearsal', 'meeting', 'admin', 'training', 'travel')),
  local_date TEXT NOT NULL,
  minutes INTEGER NOT NULL CHECK (minutes BETWEEN 1 AND 1440),
  occurrence_id TEXT REFERENCES occurrence (id),
  site_id TEXT REFERENCES site (id),
  note TEXT NOT NULL DEFAULT '',
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'submitted', 'approved', 'refused')),
  decided_by TEXT REFERENCES person (id),
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX time_entry_engagement ON time_entry (engagement_id, local_date);
CREATE UNIQUE INDEX time_entry_once ON time_entry (engagement_id, occurrence_id) WHERE occurrence_id IS NOT NULL;

-- A reimbursement, kept apart from wages.
CREATE TABLE mileage_entry (
  id TEXT PRIMARY KEY,
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  local_date TEXT NOT NULL,
  from_site_id TEXT NOT NULL REFERENCES site (id),
  to_site_id TEXT NOT NULL REFERENCES site (id),
  miles_tenths INTEGER NOT NULL CHECK (miles_tenths > 0),
  rate_minor_per_mile INTEGER NOT NULL CHECK (rate_minor_per_mile >= 0),
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'submitted', 'approved', 'refused')),
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX mileage_entry_engagement ON mileage_entry (engagement_id, local_date);

CREATE TABLE pay_run (
  id TEXT PRIMARY KEY,
  pay_period_id TEXT NOT NULL REFERENCES pay_period (id),
  -- A wrong close is put right by an extra run that holds corrections only.
  is_extra INTEGER NOT NULL DEFAULT 0 CHECK (is_extra IN (0, 1)),
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN (
    'open', 'gathering', 'with_teachers', 'answering_queries', 'ready_to_approve', 'approved', 'closed', 'exported')),
  answer_by_on TEXT,
  gathered_at INTEGER,
  approved_by TEXT REFERENCES person (id),
  approved_at INTEGER,
  closed_by TEXT REFERENCES person (id),
  closed_at INTEGER,
  totals_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(totals_json)),
  snapshot_hash TEXT,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((state IN ('closed', 'exported')) = (snapshot_hash IS NOT NULL AND closed_at IS NOT NULL))
) STRICT;
CREATE UNIQUE INDEX pay_run_one_live ON pay_run (pay_period_id) WHERE state NOT IN ('closed', 'exported');
CREATE UNIQUE INDEX pay_run_one_main ON pay_run (pay_period_id) WHERE is_extra = 0;
CREATE TRIGGER pay_run_never_reopens BEFORE UPDATE ON pay_run
WHEN OLD.state IN ('closed', 'exported') AND NOT (OLD.state = 'closed' AND NEW.state = 'exported' AND NEW.snapshot_hash = OLD.snapshot_hash
  AND NEW.totals_json = OLD.totals_json AND NEW.closed_at = OLD.closed_at AND NEW.pay_period_id = OLD.pay_period_id)
BEGIN SELECT RAISE(ABORT, 'pay_run_closed'); END;
CREATE TRIGGER pay_run_is_kept BEFORE DELETE ON pay_run WHEN OLD.state IN ('closed', 'exported') BEGIN SELECT RAISE(ABORT, 'pay_run_closed'); END;
CREATE TRIGGER pay_run_waits_for_queries BEFORE UPDATE OF state ON pay_run
WHEN NEW.state IN ('ready_to_approve', 'approved', 'closed')
  AND EXISTS (SELECT 1 FROM pay_query q WHERE q.pay_run_id = NEW.id AND q.state = 'open')
BEGIN SELECT RAISE(ABORT, 'query_open'); END;
CREATE TRIGGER pay_run_closes_without_errors BEFORE UPDATE OF state ON pay_run
WHEN NEW.state IN ('approved', 'closed') AND EXISTS (SELECT 1 FROM pay_line l WHERE l.pay_run_id = NEW.id AND l.problem <> '')
BEGIN SELECT RAISE(ABORT, 'pay_line_problem'); END;

CREATE TABLE pay_line (
  id TEXT PRIMARY KEY,
  pay_run_id TEXT NOT NULL REFERENCES pay_run (id),
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  kind TEXT NOT NULL CHECK (kind IN (
    'lesson', 'group', 'substitute', 'absence', 'other_time', 'min_top_up', 'overtime', 'correction', 'reimbursement')),
  -- What the line stands for, so that building the run again finds its own lines.
  line_key TEXT NOT NULL,
  occurrence_id TEXT REFERENCES occurrence (id),
  time_entry_id TEXT REFERENCES time_entry (id),
  mileage_entry_id TEXT REFERENCES mileage_entry (id),
  local_date TEXT NOT NULL,
  start_min INTEGER,
  text TEXT NOT NULL,
  minutes INTEGER NOT NULL DEFAULT 0 CHECK (minutes >= 0),
  rate_id TEXT REFERENCES pay_rate (id),
  rate_minor INTEGER NOT NULL DEFAULT 0,
  share_bp INTEGER NOT NULL DEFAULT 10000 CHECK (share_bp >= 0),
  amount_minor INTEGER NOT NULL,
  -- Said in words when the line cannot be paid yet: no rate, two rates of equal weight, not marked.
  problem TEXT NOT NULL DEFAULT '',
  explain_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(explain_json)),
  origin_line_id TEXT REFERENCES pay_line (id),
  query_id TEXT REFERENCES pay_query (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (pay_run_id, engagement_id, line_key),
  CHECK (problem = '' OR amount_minor = 0)
) STRICT;
CREATE UNIQUE INDEX pay_line_once ON pay_line (pay_run_id, engagement_id, occurrence_id, kind) WHERE occurrence_id IS NOT NULL;
CREATE INDEX pay_line_engagement ON pay_line (engagement_id, local_date);
CREATE INDEX pay_line_occurrence ON pay_line (occurrence_id) WHERE occurrence_id IS NOT NULL;
CREATE TRIGGER pay_line_takes_no_more BEFORE INSERT ON pay_line
WHEN (SELECT r.state FROM pay_run r WHERE r.id = NEW.pay_run_id) IN ('approved', 'closed', 'exported')
BEGIN SELECT RAISE(ABORT, 'pay_run_closed'); END;
CREATE TRIGGER pay_line_is_fixed BEFORE UPDATE ON pay_line
WHEN (SELECT r.state FROM pay_run r WHERE r.id = OLD.pay_run_id) IN ('approved', 'closed', 'exported')
BEGIN SELECT RAISE(ABORT, 'pay_run_closed'); END;
CREATE TRIGGER pay_line_is_kept BEFORE DELETE ON pay_line
WHEN (SELECT r.state FROM pay_run r WHERE r.id = OLD.pay_run_id) IN ('approved', 'closed', 'exported')
BEGIN SELECT RAISE(ABORT, 'pay_run_closed'); END;

-- About a line, or about something that is missing.
CREATE TABLE pay_query (
  id TEXT PRIMARY KEY,
  pay_run_id TEXT NOT NULL REFERENCES pay_run (id),
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  pay_line_id TEXT REFERENCES pay_line (id),
  about_on TEXT NOT NULL,
  about_text TEXT NOT NULL,
  text TEXT NOT NULL CHECK (length(trim(text)) > 0),
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'accepted', 'declined')),
  answer TEXT NOT NULL DEFAULT '',
  amount_change_minor INTEGER NOT NULL DEFAULT 0,
  asked_by TEXT NOT NULL REFERENCES person (id),
  asked_at INTEGER NOT NULL,
  answered_by TEXT REFERENCES person (id),
  answered_at INTEGER,
  CHECK (state = 'open' OR (length(trim(answer)) > 0 AND answered_at IS NOT NULL))
) STRICT;
CREATE INDEX pay_query_run ON pay_query (pay_run_id, state);
CREATE UNIQUE INDEX pay_query_one_open ON pay_query (pay_line_id) WHERE state = 'open' AND pay_line_id IS NOT NULL;
CREATE TRIGGER pay_query_is_fixed BEFORE UPDATE ON pay_query
WHEN OLD.state <> 'open' AND (NEW.state <> OLD.state OR NEW.answer <> OLD.answer OR NEW.amount_change_minor <> OLD.amount_change_minor OR NEW.text <> OLD.text)
BEGIN SELECT RAISE(ABORT, 'query_answered'); END;
CREATE TRIGGER pay_query_is_kept BEFORE DELETE ON pay_query BEGIN SELECT RAISE(ABORT, 'query_answered'); END;

CREATE TABLE pay_check (
  pay_run_id TEXT NOT NULL REFERENCES pay_run (id),
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  state TEXT NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'agreed', 'queried', 'passed_over')),
  total_minor INTEGER NOT NULL,
  reason TEXT NOT NULL DEFAULT '',
  at INTEGER,
  PRIMARY KEY (pay_run_id, engagement_id),
  CHECK (state <> 'passed_over' OR length(trim(reason)) > 0)
) STRICT, WITHOUT ROWID;

-- A change after closing: the difference goes into a later run and names the line it came from.
CREATE TABLE pay_correction (
  id TEXT PRIMARY KEY,
  origin_line_id TEXT NOT NULL REFERENCES pay_line (id),
  cause TEXT NOT NULL,
  old_minor INTEGER NOT NULL,
  new_minor INTEGER NOT NULL,
  target_run_id TEXT NOT NULL REFERENCES pay_run (id),
  target_line_id TEXT REFERENCES pay_line (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX pay_correction_origin ON pay_correction (origin_line_id);

CREATE TABLE pay_statement (
  id TEXT PRIMARY KEY,
  pay_run_id TEXT NOT NULL REFERENCES pay_run (id),
  engagement_id TEXT NOT NULL REFERENCES engagement (id),
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  sequence_no INTEGER NOT NULL,
  document_no TEXT NOT NULL,
  gross_minor INTEGER NOT NULL,
  reimbursement_minor INTEGER NOT NULL DEFAULT 0,
  currency TEXT NOT NULL,
  totals_json TEXT NOT NULL CHECK (json_valid(totals_json)),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (pay_run_id, engagement_id),
  UNIQUE (legal_entity_id, sequence_no)
) STRICT;
CREATE TRIGGER pay_statement_numbers_have_no_gap BEFORE INSERT ON pay_statement
WHEN NEW.sequence_no <> coalesce(
  (SELECT max(s.sequence_no) FROM pay_statement s WHERE s.legal_entity_id = NEW.legal_entity_id),
  (SELECT n.first_no - 1 FROM number_series n WHERE n.legal_entity_id = NEW.legal_entity_id AND n.kind = 'pay_statement'), 0) + 1
BEGIN SELECT RAISE(ABORT, 'number_gap'); END;
CREATE TRIGGER pay_statement_is_fixed BEFORE UPDATE ON pay_statement BEGIN SELECT RAISE(ABORT, 'pay_statement_fixed'); END;
CREATE TRIGGER pay_statement_is_kept BEFORE DELETE ON pay_statement BEGIN SELECT RAISE(ABORT, 'pay_statement_fixed'); END;
