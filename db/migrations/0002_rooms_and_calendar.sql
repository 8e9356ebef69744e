-- Rooms, terms, the one calendar, and the trigger that makes a double booking impossible.

CREATE TABLE feature (
  id TEXT PRIMARY KEY,
  code TEXT NOT NULL UNIQUE,
  label TEXT NOT NULL
) STRICT;

CREATE TABLE room (
  id TEXT PRIMARY KEY,
  site_id TEXT NOT NULL REFERENCES site (id),
  name TEXT NOT NULL,
  description TEXT NOT NULL DEFAULT '',
  person_limit INTEGER NOT NULL CHECK (person_limit > 0),
  turnover_min INTEGER NOT NULL DEFAULT 0 CHECK (turnover_min BETWEEN 0 AND 120),
  is_step_free INTEGER NOT NULL DEFAULT 0 CHECK (is_step_free IN (0, 1)),
  has_door_window INTEGER NOT NULL DEFAULT 1 CHECK (has_door_window IN (0, 1)),
  order_no INTEGER NOT NULL DEFAULT 0,
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'closed')),
  external_key TEXT UNIQUE,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (site_id, name)
) STRICT;

CREATE TABLE room_feature (
  room_id TEXT NOT NULL REFERENCES room (id),
  feature_id TEXT NOT NULL REFERENCES feature (id),
  quantity INTEGER NOT NULL DEFAULT 1 CHECK (quantity > 0),
  PRIMARY KEY (room_id, feature_id)
) STRICT, WITHOUT ROWID;

CREATE TABLE instrument (
  id TEXT PRIMARY KEY,
  label TEXT NOT NULL,
  kind TEXT NOT NULL,
  serial TEXT,
  value_minor INTEGER,
  room_id TEXT REFERENCES room (id),
  is_movable INTEGER NOT NULL DEFAULT 0 CHECK (is_movable IN (0, 1)),
  state TEXT NOT NULL DEFAULT 'ok' CHECK (state IN ('ok', 'limited', 'repair', 'gone'))
) STRICT;

CREATE TABLE maintenance (
  id TEXT PRIMARY KEY,
  room_id TEXT REFERENCES room (id),
  instrument_id TEXT REFERENCES instrument (id),
  kind TEXT NOT NULL CHECK (kind IN ('tuning', 'repair', 'clean')),
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  cost_minor INTEGER,
  note TEXT NOT NULL DEFAULT '',
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_at < ends_at),
  CHECK (room_id IS NOT NULL OR instrument_id IS NOT NULL)
) STRICT;

CREATE TABLE travel_time (
  from_site_id TEXT NOT NULL REFERENCES site (id),
  to_site_id TEXT NOT NULL REFERENCES site (id),
  minutes INTEGER NOT NULL CHECK (minutes >= 0),
  miles_tenths INTEGER NOT NULL DEFAULT 0,
  PRIMARY KEY (from_site_id, to_site_id)
) STRICT, WITHOUT ROWID;

CREATE TABLE term (
  id TEXT PRIMARY KEY,
  name TEXT NOT NULL,
  year_label TEXT NOT NULL,
  starts_on TEXT NOT NULL,
  ends_on TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'planned' CHECK (state IN ('planned', 'published', 'closed')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_on < ends_on),
  UNIQUE (name, year_label)
) STRICT;
CREATE TRIGGER term_does_not_overlap BEFORE INSERT ON term
WHEN EXISTS (SELECT 1 FROM term t WHERE t.starts_on <= NEW.ends_on AND NEW.starts_on <= t.ends_on)
BEGIN SELECT RAISE(ABORT, 'term_overlap'); END;

-- site_id NULL: the whole school. Part-day closures carry from_min and to_min.
CREATE TABLE closure (
  id TEXT PRIMARY KEY,
  site_id TEXT REFERENCES site (id),
  closed_on TEXT NOT NULL,
  from_min INTEGER,
  to_min INTEGER,
  kind TEXT NOT NULL CHECK (kind IN ('planned', 'unplanned')),
  reason TEXT NOT NULL,
  declared_by TEXT REFERENCES person (id),
  declared_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((from_min IS NULL) = (to_min IS NULL)),
  CHECK (from_min IS NULL OR from_min < to_min)
) STRICT;
CREATE INDEX closure_day ON closure (closed_on);

CREATE TABLE availability (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  site_id TEXT REFERENCES site (id),
  weekday INTEGER NOT NULL CHECK (weekday BETWEEN 1 AND 7),
  from_min INTEGER NOT NULL CHECK (from_min BETWEEN 0 AND 1439),
  to_min INTEGER NOT NULL CHECK (to_min BETWEEN 1 AND 1440),
  valid_from TEXT NOT NULL DEFAULT '2000-01-01',
  valid_to TEXT,
  CHECK (from_min < to_min)
) STRICT;
CREATE INDEX availability_person ON availability (person_id, weekday);

CREATE TABLE availability_exception (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL CHECK (kind IN ('away', 'extra')),
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  reason_private TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_at < ends_at)
) STRICT;
CREATE INDEX availability_exception_person ON availability_exception (person_id, starts_at);

CREATE TABLE subject (
  id TEXT PRIMARY KEY,
  code TEXT NOT NULL UNIQUE,
  label TEXT NOT NULL,
  is_on_ladder INTEGER NOT NULL DEFAULT 1 CHECK (is_on_ladder IN (0, 1))
) STRICT;

CREATE TABLE qualification (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  subject_id TEXT NOT NULL REFERENCES subject (id),
  level_from INTEGER NOT NULL DEFAULT 1 CHECK (level_from >= 1),
  level_to INTEGER NOT NULL CHECK (level_to >= 1),
  granted_by TEXT REFERENCES person (id),
  granted_on TEXT NOT NULL,
  ends_on TEXT,
  CHECK (level_from <= level_to)
) STRICT;
CREATE INDEX qualification_person ON qualification (person_id, subject_id);

CREATE TABLE lesson_type (
  id TEXT PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code IN ('single', 'group', 'ensemble', 'workshop', 'drop_in', 'trial', 'make_up', 'rehearsal', 'recital', 'rental', 'tuning', 'meeting')),
  label TEXT NOT NULL,
  seats_min INTEGER NOT NULL DEFAULT 1,
  seats_max INTEGER NOT NULL DEFAULT 1,
  is_taught INTEGER NOT NULL DEFAULT 1 CHECK (is_taught IN (0, 1)),
  CHECK (seats_min <= seats_max)
) STRICT;

CREATE TABLE lesson_type_feature (
  lesson_type_id TEXT NOT NULL REFERENCES lesson_type (id),
  feature_id TEXT NOT NULL REFERENCES feature (id),
  is_required INTEGER NOT NULL DEFAULT 1 CHECK (is_required IN (0, 1)),
  PRIMARY KEY (lesson_type_id, feature_id)
) STRICT, WITHOUT ROWID;

CREATE TABLE series (
  id TEXT PRIMARY KEY,
  lesson_type_id TEXT NOT NULL REFERENCES lesson_type (id),
  subject_id TEXT REFERENCES subject (id),
  title TEXT NOT NULL DEFAULT '',
  teacher_id TEXT REFERENCES person (id),
  room_id TEXT REFERENCES room (id),
  site_id TEXT NOT NULL REFERENCES site (id),
  zone TEXT NOT NULL,
  weekday INTEGER NOT NULL CHECK (weekday BETWEEN 1 AND 7),
  start_min INTEGER NOT NULL CHECK (start_min BETWEEN 0 AND 1439),
  length_minutes INTEGER NOT NULL CHECK (length_minutes BETWEEN 5 AND 720),
  every_n_weeks INTEGER NOT NULL DEFAULT 1 CHECK (every_n_weeks BETWEEN 1 AND 8),
  first_on TEXT NOT NULL,
  last_on TEXT NOT NULL,
  term_id TEXT REFERENCES term (id),
  follows_series_id TEXT REFERENCES series (id),
  ended_reason TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (first_on <= last_on)
) STRICT;
CREATE INDEX series_teacher ON series (teacher_id);

CREATE TABLE occurrence (
  id TEXT PRIMARY KEY,
  series_id TEXT REFERENCES series (id),
  lesson_type_id TEXT NOT NULL REFERENCES lesson_type (id),
  subject_id TEXT REFERENCES subject (id),
  title TEXT NOT NULL DEFAULT '',
  -- The promise is the wall clock: local date, start and zone. The instants are derived from it.
  local_date TEXT NOT NULL,
  start_min INTEGER NOT NULL CHECK (start_min BETWEEN 0 AND 1439),
  length_minutes INTEGER NOT NULL CHECK (length_minutes BETWEEN 5 AND 720),
  zone TEXT NOT NULL,
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  site_id TEXT NOT NULL REFERENCES site (id),
  room_id TEXT REFERENCES room (id),
  planned_teacher_id TEXT REFERENCES person (id),
  taught_by_id TEXT REFERENCES person (id),
  mode TEXT NOT NULL DEFAULT 'in_room' CHECK (mode IN ('in_room', 'online')),
  state TEXT NOT NULL DEFAULT 'planned' CHECK (state IN (
    'planned', 'needs_cover', 'confirmed', 'taught', 'not_taught', 'cancelled', 'moved', 'closed_by_school')),
  moved_to_id TEXT REFERENCES occurrence (id),
  cancel_deadline_at INTEGER,
  locked_by_pay_run_id TEXT,
  note_public TEXT NOT NULL DEFAULT '',
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_at < ends_at),
  CHECK (room_id IS NOT NULL OR mode = 'online' OR state IN ('cancelled', 'moved', 'closed_by_school'))
) STRICT;
CREATE UNIQUE INDEX occurrence_of_series ON occurrence (series_id, local_date, start_min) WHERE state <> 'moved';
CREATE INDEX occurrence_when ON occurrence (starts_at, ends_at);
CREATE INDEX occurrence_teacher ON occurrence (planned_teacher_id, starts_at);
CREATE INDEX occurrence_taught_by ON occurrence (taught_by_id, starts_at);
CREATE INDEX occurrence_room ON occurrence (room_id, starts_at);

CREATE TABLE seat (
  id TEXT PRIMARY KEY,
  occurrence_id TEXT NOT NULL REFERENCES occurrence (id),
  student_id TEXT NOT NULL REFERENCES person (id),
  enrolment_id TEXT REFERENCES enrolment (id),
  source TEXT NOT NULL DEFAULT 'roster' CHECK (source IN ('roster', 'make_up', 'drop_in', 'trial', 'visitor')),
  -- 'expected' is a state of its own: it is chased and blocks pay approval; it is never read as present.
  attendance TEXT NOT NULL DEFAULT 'expected' CHECK (attendance IN (
    'expected', 'present', 'late', 'left_early', 'online', 'away_with_notice', 'late_notice', 'no_show',
    'excused', 'teacher_away', 'school_closed')),
  arrived_at INTEGER,
  told_at INTEGER,
  told_by_id TEXT REFERENCES person (id),
  told_via TEXT CHECK (told_via IN ('phone', 'email', 'screen', 'desk', 'lesson')),
  minutes_late INTEGER CHECK (minutes_late >= 0),
  minutes_left_early INTEGER CHECK (minutes_left_early >= 0),
  marked_by_id TEXT REFERENCES person (id),
  marked_at INTEGER,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (occurrence_id, student_id),
  CHECK ((attendance = 'expected') = (marked_at IS NULL))
) STRICT;
CREATE INDEX seat_student ON seat (student_id);
CREATE INDEX seat_enrolment ON seat (enrolment_id);
CREATE TRIGGER seat_within_capacity BEFORE INSERT ON seat
WHEN (SELECT count(*) FROM seat s WHERE s.occurrence_id = NEW.occurrence_id) >= (
  SELECT max(t.seats_max, 1) FROM occurrence o JOIN lesson_type t ON t.id = o.lesson_type_id WHERE o.id = NEW.occurrence_id)
BEGIN SELECT RAISE(ABORT, 'seats_full'); END;
-- Every change of a mark raises the row version, so that two people marking at once do not overwrite each other unseen.
CREATE TRIGGER seat_change_raises_version BEFORE UPDATE OF attendance ON seat
WHEN OLD.attendance <> NEW.attendance AND NEW.row_version = OLD.row_version
BEGIN SELECT RAISE(ABORT, 'stale_seat'); END;

-- Who or what is taken, and when. One holder is in one place at a time: spans are half-open and the database refuses
-- an overlap. A span is at most a day, so that the search behind the trigger stays bounded; a longer closure is one hold a day.
CREATE TABLE hold (
  id INTEGER PRIMARY KEY,
  holder_kind TEXT NOT NULL CHECK (holder_kind IN ('teacher', 'room', 'student', 'instrument')),
  holder_id TEXT NOT NULL,
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  occurrence_id TEXT REFERENCES occurrence (id),
  opening_offer_id TEXT REFERENCES opening_offer (id),
  maintenance_id TEXT REFERENCES maintenance (id),
  rental_id TEXT REFERENCES rental (id),
  is_live INTEGER NOT NULL DEFAULT 1 CHECK (is_live IN (0, 1)),
  CHECK (starts_at < ends_at AND ends_at - starts_at <= 86400),
  CHECK ((occurrence_id IS NOT NULL) + (opening_offer_id IS NOT NULL) + (maintenance_id IS NOT NULL) + (rental_id IS NOT NULL) = 1)
) STRICT;
CREATE INDEX hold_holder ON hold (holder_kind, holder_id, starts_at) WHERE is_live = 1;
CREATE INDEX hold_occurrence ON hold (occurrence_id);
CREATE INDEX hold_offer ON hold (opening_offer_id) WHERE opening_offer_id IS NOT NULL;
CREATE TRIGGER hold_never_overlaps BEFORE INSERT ON hold
WHEN NEW.is_live = 1 AND EXISTS (
  SELECT 1 FROM hold h WHERE h.is_live = 1 AND h.holder_kind = NEW.holder_kind AND h.holder_id = NEW.holder_id
  AND h.starts_at < NEW.ends_at AND h.starts_at > NEW.starts_at - 86400 AND h.ends_at > NEW.starts_at)
BEGIN SELECT RAISE(ABORT, 'hold_overlap'); END;
CREATE TRIGGER hold_update_never_overlaps BEFORE UPDATE ON hold
WHEN NEW.is_live = 1 AND EXISTS (
  SELECT 1 FROM hold h WHERE h.id <> NEW.id AND h.is_live = 1 AND h.holder_kind = NEW.holder_kind AND h.holder_id = NEW.holder_id
  AND h.starts_at < NEW.ends_at AND h.starts_at > NEW.starts_at - 86400 AND h.ends_at > NEW.starts_at)
BEGIN SELECT RAISE(ABORT, 'hold_overlap'); END;

-- An opening kept for a short while, for a caller who will ring back.
CREATE TABLE opening_offer (
  id TEXT PRIMARY KEY,
  enquiry_id TEXT REFERENCES enquiry (id),
  student_id TEXT REFERENCES person (id),
  teacher_id TEXT NOT NULL REFERENCES person (id),
  room_id TEXT NOT NULL REFERENCES room (id),
  site_id TEXT NOT NULL REFERENCES site (id),
  subject_id TEXT REFERENCES subject (id),
  local_date TEXT NOT NULL,
  start_min INTEGER NOT NULL,
  length_minutes INTEGER NOT NULL,
  zone TEXT NOT NULL,
  is_weekly INTEGER NOT NULL DEFAULT 0 CHECK (is_weekly IN (0, 1)),
  held_until INTEGER NOT NULL,
  state TEXT NOT NULL DEFAULT 'held' CHECK (state IN ('held', 'accepted', 'lapsed', 'withdrawn')),
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX opening_offer_state ON opening_offer (state, held_until);

CREATE TABLE rule_override (
  id TEXT PRIMARY KEY,
  occurrence_id TEXT NOT NULL REFERENCES occurrence (id),
  rule_code TEXT NOT NULL,
  reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
  by_id TEXT NOT NULL REFERENCES person (id),
  at INTEGER NOT NULL
) STRICT;

CREATE TABLE cover_plan (
  id TEXT PRIMARY KEY,
  teacher_id TEXT NOT NULL REFERENCES person (id),
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'sent', 'settled', 'withdrawn')),
  opened_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_at < ends_at)
) STRICT;
CREATE TABLE cover_item (
  id TEXT PRIMARY KEY,
  cover_plan_id TEXT NOT NULL REFERENCES cover_plan (id),
  occurrence_id TEXT NOT NULL REFERENCES occurrence (id),
  action TEXT NOT NULL CHECK (action IN ('cover', 'combine', 'move', 'online', 'cancel_credit')),
  to_teacher_id TEXT REFERENCES person (id),
  pay_minor INTEGER,
  state TEXT NOT NULL DEFAULT 'proposed' CHECK (state IN ('proposed', 'asked', 'confirmed', 'declined', 'withdrawn'))
) STRICT;
CREATE UNIQUE INDEX cover_item_live ON cover_item (occurrence_id) WHERE state IN ('proposed', 'asked', 'confirmed');
CREATE TABLE cover_offer (
  id TEXT PRIMARY KEY,
  cover_item_id TEXT NOT NULL REFERENCES cover_item (id),
  to_person_id TEXT NOT NULL REFERENCES person (id),
  secret_hash TEXT NOT NULL UNIQUE,
  sent_at INTEGER NOT NULL,
  answer_by INTEGER NOT NULL,
  answer TEXT CHECK (answer IN ('accepted', 'declined', 'too_late', 'lapsed', 'withdrawn')),
  answered_at INTEGER
) STRICT;
CREATE UNIQUE INDEX cover_offer_first_yes ON cover_offer (cover_item_id) WHERE answer = 'accepted';

CREATE TABLE rental (
  id TEXT PRIMARY KEY,
  room_id TEXT REFERENCES room (id),
  instrument_id TEXT REFERENCES instrument (id),
  renter_name TEXT NOT NULL,
  starts_at INTEGER NOT NULL,
  ends_at INTEGER NOT NULL,
  price_minor INTEGER NOT NULL DEFAULT 0,
  deposit_minor INTEGER NOT NULL DEFAULT 0,
  state TEXT NOT NULL DEFAULT 'booked' CHECK (state IN ('booked', 'paid', 'cancelled')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (starts_at < ends_at)
) STRICT;

CREATE TABLE calendar_feed (
  id TEXT PRIMARY KEY,
  user_id TEXT NOT NULL REFERENCES user_account (id),
  secret_hash TEXT NOT NULL UNIQUE,
  revoked_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
