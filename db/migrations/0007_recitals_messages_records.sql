-- Recitals, what is sent to whom, what happened and who did it.

CREATE TABLE recital (
  id TEXT PRIMARY KEY,
  title TEXT NOT NULL,
  occurrence_id TEXT REFERENCES occurrence (id),
  room_id TEXT REFERENCES room (id),
  venue_name TEXT NOT NULL DEFAULT '',
  person_limit INTEGER NOT NULL CHECK (person_limit > 0),
  seat_count INTEGER NOT NULL CHECK (seat_count > 0),
  step_free_places INTEGER NOT NULL DEFAULT 0,
  seats_lost_per_place INTEGER NOT NULL DEFAULT 2,
  staff_count INTEGER NOT NULL DEFAULT 0,
  local_date TEXT NOT NULL,
  start_min INTEGER NOT NULL,
  hard_end_min INTEGER NOT NULL,
  words_seconds INTEGER NOT NULL DEFAULT 120,
  applause_seconds INTEGER NOT NULL DEFAULT 30,
  seats_per_family INTEGER NOT NULL DEFAULT 4,
  reply_by_on TEXT,
  state TEXT NOT NULL DEFAULT 'idea' CHECK (state IN (
    'idea', 'date_held', 'collecting_pieces', 'programme_drafted', 'programme_fixed', 'invitations_out', 'replies_closed',
    'day', 'held', 'wrapped_up', 'called_off')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (start_min < hard_end_min)
) STRICT;

CREATE TABLE programme_item (
  id TEXT PRIMARY KEY,
  recital_id TEXT NOT NULL REFERENCES recital (id),
  order_no INTEGER,
  piece TEXT NOT NULL,
  composer TEXT NOT NULL DEFAULT '',
  duration_seconds INTEGER NOT NULL CHECK (duration_seconds BETWEEN 10 AND 7200),
  set_up_code TEXT NOT NULL DEFAULT 'solo' CHECK (set_up_code IN ('solo', 'duet', 'voice', 'trio', 'ensemble')),
  accompanist_id TEXT REFERENCES person (id),
  teacher_id TEXT REFERENCES person (id),
  is_pinned INTEGER NOT NULL DEFAULT 0 CHECK (is_pinned IN (0, 1)),
  state TEXT NOT NULL DEFAULT 'proposed' CHECK (state IN ('proposed', 'accepted', 'withdrawn')),
  UNIQUE (recital_id, order_no)
) STRICT;
CREATE TABLE item_performer (
  item_id TEXT NOT NULL REFERENCES programme_item (id),
  person_id TEXT NOT NULL REFERENCES person (id),
  part TEXT NOT NULL DEFAULT '',
  PRIMARY KEY (item_id, person_id)
) STRICT, WITHOUT ROWID;
CREATE TABLE set_up_change (
  from_code TEXT NOT NULL,
  to_code TEXT NOT NULL,
  seconds INTEGER NOT NULL CHECK (seconds >= 0),
  PRIMARY KEY (from_code, to_code)
) STRICT, WITHOUT ROWID;
CREATE TABLE rehearsal_slot (
  id TEXT PRIMARY KEY,
  recital_id TEXT NOT NULL REFERENCES recital (id),
  item_id TEXT REFERENCES programme_item (id),
  occurrence_id TEXT NOT NULL UNIQUE REFERENCES occurrence (id)
) STRICT;
CREATE TABLE recital_reply (
  id TEXT PRIMARY KEY,
  recital_id TEXT NOT NULL REFERENCES recital (id),
  family_id TEXT NOT NULL REFERENCES family (id),
  seats_allowed INTEGER NOT NULL CHECK (seats_allowed >= 0),
  seats_wanted INTEGER CHECK (seats_wanted >= 0),
  seats_granted INTEGER NOT NULL DEFAULT 0 CHECK (seats_granted >= 0),
  seats_waiting INTEGER NOT NULL DEFAULT 0 CHECK (seats_waiting >= 0),
  answered_by TEXT REFERENCES person (id),
  answered_at INTEGER,
  UNIQUE (recital_id, family_id)
) STRICT;
CREATE TRIGGER recital_hall_is_not_over_full BEFORE UPDATE OF seats_granted ON recital_reply
WHEN NEW.seats_granted > OLD.seats_granted AND (
  SELECT coalesce(sum(r.seats_granted), 0) FROM recital_reply r WHERE r.recital_id = NEW.recital_id AND r.id <> NEW.id) + NEW.seats_granted
  + (SELECT c.staff_count FROM recital c WHERE c.id = NEW.recital_id)
  + (SELECT count(DISTINCT p.person_id) FROM item_performer p JOIN programme_item i ON i.id = p.item_id
     WHERE i.recital_id = NEW.recital_id AND i.state <> 'withdrawn')
  > (SELECT c.person_limit FROM recital c WHERE c.id = NEW.recital_id)
BEGIN SELECT RAISE(ABORT, 'hall_full'); END;

-- The mail is written in the same transaction as its cause. `key` is topic + subject + recipient + version: nobody is told twice.
CREATE TABLE outbox (
  id TEXT PRIMARY KEY,
  key TEXT NOT NULL UNIQUE,
  topic TEXT NOT NULL,
  subject_ref TEXT NOT NULL DEFAULT '',
  recipient_id TEXT REFERENCES person (id),
  to_name TEXT NOT NULL DEFAULT '',
  to_address TEXT NOT NULL,
  language TEXT NOT NULL DEFAULT 'en',
  subject TEXT NOT NULL,
  body_text TEXT NOT NULL,
  body_html TEXT NOT NULL DEFAULT '',
  attachments_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(attachments_json)),
  state TEXT NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'sending', 'sent', 'bounced', 'given_up', 'withdrawn')),
  tries INTEGER NOT NULL DEFAULT 0,
  next_try_at INTEGER NOT NULL DEFAULT 0,
  lease_until INTEGER,
  lease_owner TEXT,
  sent_at INTEGER,
  last_error TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX outbox_due ON outbox (next_try_at) WHERE state IN ('queued', 'sending');
CREATE INDEX outbox_recipient ON outbox (recipient_id, created_at);

CREATE TABLE notification_choice (
  person_id TEXT NOT NULL REFERENCES person (id),
  topic TEXT NOT NULL,
  channel TEXT NOT NULL DEFAULT 'email',
  is_on INTEGER NOT NULL CHECK (is_on IN (0, 1)),
  is_digest INTEGER NOT NULL DEFAULT 0 CHECK (is_digest IN (0, 1)),
  PRIMARY KEY (person_id, topic, channel)
) STRICT, WITHOUT ROWID;

CREATE TABLE thread (
  id TEXT PRIMARY KEY,
  about_student_id TEXT REFERENCES person (id),
  title TEXT NOT NULL,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE TABLE thread_member (
  thread_id TEXT NOT NULL REFERENCES thread (id),
  person_id TEXT NOT NULL REFERENCES person (id),
  read_at INTEGER,
  PRIMARY KEY (thread_id, person_id)
) STRICT, WITHOUT ROWID;
CREATE TABLE message (
  id TEXT PRIMARY KEY,
  thread_id TEXT NOT NULL REFERENCES thread (id),
  from_id TEXT NOT NULL REFERENCES person (id),
  body TEXT NOT NULL CHECK (length(trim(body)) > 0),
  at INTEGER NOT NULL
) STRICT;
-- A thread about a student under age always has a guardian in it, or nobody can write.
CREATE TRIGGER message_has_a_guardian BEFORE INSERT ON message
WHEN EXISTS (
  SELECT 1 FROM thread t JOIN person p ON p.id = t.about_student_id
  WHERE t.id = NEW.thread_id AND p.born_on IS NOT NULL AND date(p.born_on, '+18 years') > date(NEW.at, 'unixepoch'))
AND NOT EXISTS (
  SELECT 1 FROM thread t JOIN relationship r ON r.child_id = t.about_student_id AND r.has_legal_care = 1
  JOIN thread_member m ON m.thread_id = t.id AND m.person_id = r.adult_id WHERE t.id = NEW.thread_id)
BEGIN SELECT RAISE(ABORT, 'guardian_missing'); END;

-- Append-only, each row hashed with the one before it, so that a removal shows.
CREATE TABLE audit (
  seq INTEGER PRIMARY KEY,
  at INTEGER NOT NULL,
  actor_id TEXT,
  actor_role TEXT NOT NULL,
  action TEXT NOT NULL,
  table_name TEXT NOT NULL,
  row_id TEXT NOT NULL,
  sentence TEXT NOT NULL,
  before_json TEXT,
  after_json TEXT,
  reason TEXT NOT NULL DEFAULT '',
  prev_hash TEXT NOT NULL,
  hash TEXT NOT NULL UNIQUE
) STRICT;
CREATE INDEX audit_row ON audit (table_name, row_id);
CREATE TRIGGER audit_is_fixed BEFORE UPDATE ON audit BEGIN SELECT RAISE(ABORT, 'audit_fixed'); END;
CREATE TRIGGER audit_is_kept BEFORE DELETE ON audit BEGIN SELECT RAISE(ABORT, 'audit_fixed'); END;

CREATE TABLE access_log (
  id INTEGER PRIMARY KEY,
  at INTEGER NOT NULL,
  actor_id TEXT NOT NULL,
  what TEXT NOT NULL,
  about_id TEXT NOT NULL,
  why TEXT NOT NULL DEFAULT ''
) STRICT;
CREATE TRIGGER access_log_is_fixed BEFORE UPDATE ON access_log BEGIN SELECT RAISE(ABORT, 'log_fixed'); END;
CREATE TRIGGER access_log_is_kept BEFORE DELETE ON access_log BEGIN SELECT RAISE(ABORT, 'log_fixed'); END;

CREATE TABLE import_batch (
  id TEXT PRIMARY KEY,
  kind TEXT NOT NULL DEFAULT 'school',
  file_name TEXT NOT NULL,
  file_sha256 TEXT NOT NULL,
  mapping_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(mapping_json)),
  control_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(control_json)),
  state TEXT NOT NULL DEFAULT 'uploaded' CHECK (state IN ('uploaded', 'checked', 'imported', 'undone')),
  created_by TEXT REFERENCES person (id),
  imported_at INTEGER,
  undone_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE TABLE import_row (
  id TEXT PRIMARY KEY,
  batch_id TEXT NOT NULL REFERENCES import_batch (id),
  sheet TEXT NOT NULL,
  row_no INTEGER NOT NULL CHECK (row_no > 0),
  raw_json TEXT NOT NULL CHECK (json_valid(raw_json)),
  verdict TEXT NOT NULL CHECK (verdict IN ('new', 'same', 'changed', 'duplicate', 'faulty', 'blank')),
  reason TEXT NOT NULL DEFAULT '',
  target_table TEXT,
  target_id TEXT,
  row_hash TEXT NOT NULL,
  UNIQUE (batch_id, sheet, row_no)
) STRICT;

CREATE TABLE data_request (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL CHECK (kind IN ('copy', 'correct', 'erase')),
  received_on TEXT NOT NULL,
  due_on TEXT NOT NULL,
  plan_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(plan_json)),
  state TEXT NOT NULL DEFAULT 'received' CHECK (state IN ('received', 'identity_checked', 'plan_made', 'approved', 'done', 'refused')),
  reason TEXT NOT NULL DEFAULT ''
) STRICT;

CREATE TABLE retention_rule (
  id TEXT PRIMARY KEY,
  record_kind TEXT NOT NULL,
  country TEXT NOT NULL,
  keep_months INTEGER,
  basis TEXT NOT NULL DEFAULT '',
  checked_on TEXT,
  checked_by TEXT REFERENCES person (id),
  UNIQUE (record_kind, country)
) STRICT;

-- Slow work with progress that a person can leave and come back to.
CREATE TABLE job (
  id TEXT PRIMARY KEY,
  kind TEXT NOT NULL,
  label TEXT NOT NULL,
  input_json TEXT NOT NULL CHECK (json_valid(input_json)),
  -- The same work asked for twice is one job.
  key TEXT UNIQUE,
  asked_by_user_id TEXT REFERENCES user_account (id),
  state TEXT NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'running', 'done', 'failed')),
  done_count INTEGER NOT NULL DEFAULT 0,
  total_count INTEGER,
  message TEXT NOT NULL DEFAULT '',
  result_json TEXT,
  tries INTEGER NOT NULL DEFAULT 0,
  lease_until INTEGER,
  lease_owner TEXT,
  started_at INTEGER,
  ended_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX job_due ON job (state, created_at);
-- A daily job runs once a day.
CREATE TABLE job_run (
  job TEXT NOT NULL,
  scope TEXT NOT NULL DEFAULT '',
  local_day TEXT NOT NULL,
  started_at INTEGER NOT NULL,
  ended_at INTEGER,
  result TEXT NOT NULL DEFAULT '',
  PRIMARY KEY (job, scope, local_day)
) STRICT, WITHOUT ROWID;
