-- From the first call to the weekly lesson, and what a missed lesson gives back.

CREATE TABLE enquiry (
  id TEXT PRIMARY KEY,
  contact_name TEXT NOT NULL,
  contact_email TEXT,
  contact_phone TEXT,
  contact_person_id TEXT REFERENCES person (id),
  student_name TEXT NOT NULL,
  student_id TEXT REFERENCES person (id),
  student_age INTEGER CHECK (student_age BETWEEN 3 AND 120),
  is_adult INTEGER NOT NULL DEFAULT 0 CHECK (is_adult IN (0, 1)),
  subject_id TEXT REFERENCES subject (id),
  experience TEXT NOT NULL DEFAULT '',
  level_guess INTEGER NOT NULL DEFAULT 1 CHECK (level_guess BETWEEN 1 AND 20),
  -- When the family could come: [{weekday, fromMin, toMin}], and the site they prefer.
  wishes_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(wishes_json)),
  site_id TEXT REFERENCES site (id),
  length_minutes INTEGER NOT NULL DEFAULT 30 CHECK (length_minutes BETWEEN 15 AND 180),
  source TEXT NOT NULL DEFAULT 'web' CHECK (source IN ('web', 'phone', 'desk', 'import')),
  message TEXT NOT NULL DEFAULT '',
  state TEXT NOT NULL DEFAULT 'new' CHECK (state IN (
    'new', 'answered', 'slot_offered', 'trial_booked', 'trial_taken', 'deciding', 'waiting_list', 'enrolled', 'closed')),
  next_step_on TEXT,
  closed_reason TEXT,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (contact_email IS NOT NULL OR contact_phone IS NOT NULL)
) STRICT;
CREATE INDEX enquiry_state ON enquiry (state, created_at);

CREATE TABLE enquiry_event (
  id TEXT PRIMARY KEY,
  enquiry_id TEXT NOT NULL REFERENCES enquiry (id),
  at INTEGER NOT NULL,
  kind TEXT NOT NULL,
  text TEXT NOT NULL,
  by_id TEXT REFERENCES person (id)
) STRICT;
CREATE INDEX enquiry_event_of ON enquiry_event (enquiry_id, at);
CREATE TRIGGER enquiry_event_is_kept BEFORE DELETE ON enquiry_event BEGIN SELECT RAISE(ABORT, 'event_fixed'); END;
CREATE TRIGGER enquiry_event_is_fixed BEFORE UPDATE ON enquiry_event BEGIN SELECT RAISE(ABORT, 'event_fixed'); END;

CREATE TABLE trial (
  id TEXT PRIMARY KEY,
  enquiry_id TEXT NOT NULL REFERENCES enquiry (id),
  occurrence_id TEXT NOT NULL UNIQUE REFERENCES occurrence (id),
  student_id TEXT NOT NULL REFERENCES person (id),
  fee_minor INTEGER NOT NULL CHECK (fee_minor >= 0),
  -- Enrolling up to and including this day credits the fee on the first bill.
  credit_until_on TEXT NOT NULL,
  outcome TEXT CHECK (outcome IN ('good_fit', 'second_trial', 'not_now')),
  suggested_level INTEGER CHECK (suggested_level BETWEEN 1 AND 20),
  impression TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE waiting_entry (
  id TEXT PRIMARY KEY,
  enquiry_id TEXT REFERENCES enquiry (id),
  student_id TEXT REFERENCES person (id),
  subject_id TEXT REFERENCES subject (id),
  wishes_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(wishes_json)),
  asked_on TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'offered', 'placed', 'left')),
  offers_made INTEGER NOT NULL DEFAULT 0,
  CHECK (enquiry_id IS NOT NULL OR student_id IS NOT NULL)
) STRICT;

CREATE TABLE enrolment (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  family_id TEXT NOT NULL REFERENCES family (id),
  subject_id TEXT NOT NULL REFERENCES subject (id),
  lesson_type_id TEXT NOT NULL REFERENCES lesson_type (id),
  series_id TEXT REFERENCES series (id),
  length_minutes INTEGER NOT NULL CHECK (length_minutes BETWEEN 15 AND 180),
  teacher_id TEXT REFERENCES person (id),
  site_id TEXT NOT NULL REFERENCES site (id),
  tuition_model TEXT NOT NULL DEFAULT 'per_term_count' CHECK (tuition_model IN (
    'per_term_count', 'per_term_flat', 'monthly_flat', 'per_lesson', 'package', 'group_seat')),
  -- The price agreed per lesson (or per term, per month) of this enrolment; NULL takes the price list of the day.
  unit_price_minor INTEGER CHECK (unit_price_minor >= 0),
  starts_on TEXT NOT NULL,
  ends_on TEXT,
  state TEXT NOT NULL DEFAULT 'active' CHECK (state IN ('draft', 'offered', 'active', 'paused', 'notice_given', 'ended', 'refused')),
  terms_version TEXT,
  accepted_by TEXT REFERENCES person (id),
  accepted_at INTEGER,
  trial_id TEXT REFERENCES trial (id),
  on_ladder INTEGER NOT NULL DEFAULT 1 CHECK (on_ladder IN (0, 1)),
  external_key TEXT UNIQUE,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (ends_on IS NULL OR starts_on <= ends_on)
) STRICT;
CREATE INDEX enrolment_student ON enrolment (student_id, state);
CREATE INDEX enrolment_teacher ON enrolment (teacher_id, state);
CREATE INDEX enrolment_family ON enrolment (family_id);
CREATE INDEX enrolment_series ON enrolment (series_id);

CREATE TABLE enrolment_change (
  id TEXT PRIMARY KEY,
  enrolment_id TEXT NOT NULL REFERENCES enrolment (id),
  kind TEXT NOT NULL CHECK (kind IN ('start', 'move', 'length', 'teacher', 'price', 'pause', 'resume', 'withdraw', 'end')),
  effective_on TEXT NOT NULL,
  before_json TEXT NOT NULL CHECK (json_valid(before_json)),
  after_json TEXT NOT NULL CHECK (json_valid(after_json)),
  bill_effect_minor INTEGER NOT NULL DEFAULT 0,
  by_id TEXT REFERENCES person (id),
  at INTEGER NOT NULL
) STRICT;
CREATE TRIGGER enrolment_change_is_fixed BEFORE UPDATE ON enrolment_change BEGIN SELECT RAISE(ABORT, 'change_fixed'); END;
CREATE TRIGGER enrolment_change_is_kept BEFORE DELETE ON enrolment_change BEGIN SELECT RAISE(ABORT, 'change_fixed'); END;

CREATE TABLE withdrawal_notice (
  id TEXT PRIMARY KEY,
  enrolment_id TEXT NOT NULL REFERENCES enrolment (id),
  received_on TEXT NOT NULL,
  last_chargeable_on TEXT NOT NULL,
  computed_credit_minor INTEGER NOT NULL DEFAULT 0,
  withdrawn_at INTEGER
) STRICT;

CREATE TABLE package (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  product_id TEXT NOT NULL REFERENCES product (id),
  units INTEGER NOT NULL CHECK (units > 0),
  price_minor INTEGER NOT NULL CHECK (price_minor >= 0),
  bought_on TEXT NOT NULL,
  expires_on TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'used_up', 'expired', 'refunded'))
) STRICT;
CREATE TABLE package_draw (
  id TEXT PRIMARY KEY,
  package_id TEXT NOT NULL REFERENCES package (id),
  seat_id TEXT NOT NULL UNIQUE REFERENCES seat (id),
  units INTEGER NOT NULL DEFAULT 1 CHECK (units > 0),
  reversed_at INTEGER
) STRICT;
CREATE TRIGGER package_is_not_overdrawn BEFORE INSERT ON package_draw
WHEN (SELECT coalesce(sum(d.units), 0) FROM package_draw d WHERE d.package_id = NEW.package_id AND d.reversed_at IS NULL) + NEW.units
  > (SELECT p.units FROM package p WHERE p.id = NEW.package_id)
BEGIN SELECT RAISE(ABORT, 'package_overdrawn'); END;

CREATE TABLE make_up_credit (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  enrolment_id TEXT NOT NULL REFERENCES enrolment (id),
  source_seat_id TEXT NOT NULL UNIQUE REFERENCES seat (id),
  cause TEXT NOT NULL CHECK (cause IN ('family', 'school', 'owner')),
  minutes INTEGER NOT NULL CHECK (minutes > 0),
  born_on TEXT NOT NULL,
  -- The make-up lesson must take place on or before this day.
  last_on TEXT NOT NULL,
  counts_to_cap INTEGER NOT NULL CHECK (counts_to_cap IN (0, 1)),
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'used', 'expired', 'cancelled')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX make_up_credit_student ON make_up_credit (student_id, state, last_on);
CREATE TABLE make_up_use (
  id TEXT PRIMARY KEY,
  credit_id TEXT NOT NULL REFERENCES make_up_credit (id),
  seat_id TEXT NOT NULL REFERENCES seat (id),
  minutes INTEGER NOT NULL CHECK (minutes > 0),
  reversed_at INTEGER,
  UNIQUE (credit_id, seat_id)
) STRICT;
CREATE TRIGGER credit_is_not_overused BEFORE INSERT ON make_up_use
WHEN (SELECT coalesce(sum(u.minutes), 0) FROM make_up_use u WHERE u.credit_id = NEW.credit_id AND u.reversed_at IS NULL) + NEW.minutes
  > (SELECT c.minutes FROM make_up_credit c WHERE c.id = NEW.credit_id)
BEGIN SELECT RAISE(ABORT, 'credit_overused'); END;
CREATE TRIGGER credit_is_used_in_time BEFORE INSERT ON make_up_use
WHEN (SELECT o.local_date FROM seat s JOIN occurrence o ON o.id = s.occurrence_id WHERE s.id = NEW.seat_id)
  > (SELECT c.last_on FROM make_up_credit c WHERE c.id = NEW.credit_id)
BEGIN SELECT RAISE(ABORT, 'credit_expired'); END;
CREATE TABLE make_up_extension (
  id TEXT PRIMARY KEY,
  credit_id TEXT NOT NULL REFERENCES make_up_credit (id),
  old_last_on TEXT NOT NULL,
  new_last_on TEXT NOT NULL,
  reason TEXT NOT NULL,
  by_id TEXT REFERENCES person (id),
  at INTEGER NOT NULL
) STRICT;
CREATE TRIGGER make_up_extension_is_fixed BEFORE UPDATE ON make_up_extension BEGIN SELECT RAISE(ABORT, 'extension_fixed'); END;
