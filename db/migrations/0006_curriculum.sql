-- The ladder, its editions, who stands where, and the hearings with their proofs. A decided hearing, its proofs and a
-- published report are for good; a change is a new row that points at the old one.

CREATE TABLE ladder (
  id TEXT PRIMARY KEY,
  name TEXT NOT NULL UNIQUE CHECK (length(trim(name)) > 0),
  subject_id TEXT NOT NULL REFERENCES subject (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE ladder_edition (
  id TEXT PRIMARY KEY,
  ladder_id TEXT NOT NULL REFERENCES ladder (id),
  label TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'live', 'retired')),
  starts_on TEXT NOT NULL,
  created_by TEXT REFERENCES person (id),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (ladder_id, label)
) STRICT;
CREATE UNIQUE INDEX ladder_edition_one_live ON ladder_edition (ladder_id) WHERE state = 'live';

CREATE TABLE level (
  id TEXT PRIMARY KEY,
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  no INTEGER NOT NULL CHECK (no >= 1),
  title TEXT NOT NULL,
  -- One word under a small picture.
  short_title TEXT NOT NULL,
  plain_title TEXT NOT NULL,
  UNIQUE (edition_id, no)
) STRICT;

-- A rung keeps its identity across editions; what it asks is its text in one edition.
CREATE TABLE rung (
  id TEXT PRIMARY KEY,
  ladder_id TEXT NOT NULL REFERENCES ladder (id),
  code TEXT NOT NULL,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (ladder_id, code)
) STRICT;

CREATE TABLE rung_text (
  id TEXT PRIMARY KEY,
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  level_id TEXT NOT NULL REFERENCES level (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  order_no INTEGER NOT NULL,
  title TEXT NOT NULL CHECK (length(trim(title)) > 0),
  -- For guardians and students: a short name, what one can do with it, and what it sounds like.
  plain_title TEXT NOT NULL CHECK (length(trim(plain_title)) > 0),
  can_do TEXT NOT NULL CHECK (length(trim(can_do)) > 0),
  sounds_like TEXT NOT NULL CHECK (length(trim(sounds_like)) > 0),
  play_spec_json TEXT NOT NULL CHECK (json_valid(play_spec_json)),
  criteria_json TEXT NOT NULL CHECK (json_valid(criteria_json)),
  key_pool_json TEXT NOT NULL CHECK (json_valid(key_pool_json)),
  keys_drawn INTEGER NOT NULL CHECK (keys_drawn > 0),
  keys_needed INTEGER NOT NULL CHECK (keys_needed BETWEEN 1 AND keys_drawn),
  evidence_kind TEXT NOT NULL CHECK (evidence_kind IN ('notes', 'notes_and_time', 'spoken')),
  UNIQUE (edition_id, rung_id),
  UNIQUE (edition_id, order_no)
) STRICT;
CREATE INDEX rung_text_level ON rung_text (level_id, order_no);

CREATE TABLE rung_need (
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  needs_rung_id TEXT NOT NULL REFERENCES rung (id),
  kind TEXT NOT NULL CHECK (kind IN ('must', 'should')),
  PRIMARY KEY (edition_id, rung_id, needs_rung_id),
  CHECK (rung_id <> needs_rung_id)
) STRICT, WITHOUT ROWID;

-- What a live edition asks stays as it was printed; the next edition asks something else.
CREATE TRIGGER rung_text_is_fixed_once_live BEFORE UPDATE ON rung_text
WHEN (SELECT e.state FROM ladder_edition e WHERE e.id = OLD.edition_id) <> 'draft'
BEGIN SELECT RAISE(ABORT, 'edition_fixed'); END;
CREATE TRIGGER rung_text_is_kept_once_live BEFORE DELETE ON rung_text
WHEN (SELECT e.state FROM ladder_edition e WHERE e.id = OLD.edition_id) <> 'draft'
BEGIN SELECT RAISE(ABORT, 'edition_fixed'); END;
CREATE TRIGGER rung_text_joins_drafts_only BEFORE INSERT ON rung_text
WHEN (SELECT e.state FROM ladder_edition e WHERE e.id = NEW.edition_id) <> 'draft'
BEGIN SELECT RAISE(ABORT, 'edition_fixed'); END;

CREATE TABLE edition_map (
  id TEXT PRIMARY KEY,
  from_edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  from_rung_id TEXT NOT NULL REFERENCES rung (id),
  to_edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  to_rung_id TEXT NOT NULL REFERENCES rung (id),
  rule TEXT NOT NULL CHECK (rule IN ('same', 'credited', 'kept', 're_check', 'new')),
  UNIQUE (from_edition_id, from_rung_id, to_edition_id, to_rung_id)
) STRICT;

CREATE TABLE student_ladder (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  ladder_id TEXT NOT NULL REFERENCES ladder (id),
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  since_on TEXT NOT NULL,
  UNIQUE (student_id, ladder_id)
) STRICT;

-- Derived from hearings, credits and re-checks; may be dropped and rebuilt at any time.
CREATE TABLE student_rung (
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  state TEXT NOT NULL CHECK (state IN ('locked', 'open', 'working', 'passed', 'recheck_due', 'credited')),
  since_on TEXT,
  hearing_id TEXT REFERENCES hearing (id),
  PRIMARY KEY (student_id, rung_id)
) STRICT, WITHOUT ROWID;
CREATE INDEX student_rung_state ON student_rung (edition_id, rung_id, state);

CREATE TABLE rung_credit (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  cause TEXT NOT NULL CHECK (cause IN ('edition', 'placement', 'lead')),
  reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
  by_id TEXT NOT NULL REFERENCES person (id),
  credited_on TEXT NOT NULL,
  at INTEGER NOT NULL,
  UNIQUE (student_id, rung_id)
) STRICT;

CREATE TABLE recheck_request (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  -- For staff only; the family reads that it will be heard once more.
  reason_private TEXT NOT NULL,
  by_id TEXT NOT NULL REFERENCES person (id),
  asked_on TEXT NOT NULL,
  at INTEGER NOT NULL
) STRICT;
CREATE INDEX recheck_request_student ON recheck_request (student_id, rung_id);

-- The lead sets a need, the waiting days or the limit of attempts aside, once, for one rung of one student.
CREATE TABLE hearing_agreement (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
  by_id TEXT NOT NULL REFERENCES person (id),
  at INTEGER NOT NULL,
  used_by_hearing_id TEXT UNIQUE REFERENCES hearing (id)
) STRICT;
CREATE INDEX hearing_agreement_open ON hearing_agreement (student_id, rung_id) WHERE used_by_hearing_id IS NULL;

CREATE TABLE hearing (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  occurrence_id TEXT REFERENCES occurrence (id),
  term_id TEXT REFERENCES term (id),
  assessor_id TEXT NOT NULL REFERENCES person (id),
  state TEXT NOT NULL DEFAULT 'planned' CHECK (state IN ('planned', 'keys_drawn', 'played', 'decided', 'stopped')),
  seed INTEGER,
  -- [{key, turn}] in the order in which they are asked.
  keys_drawn_json TEXT CHECK (keys_drawn_json IS NULL OR json_valid(keys_drawn_json)),
  outcome TEXT CHECK (outcome IN ('passed', 'not_yet')),
  keys_heard INTEGER CHECK (keys_heard >= 0),
  total_hundredths INTEGER CHECK (total_hundredths BETWEEN 0 AND 400),
  -- Why it passes although fewer keys were heard than the rung asks.
  pass_reason TEXT NOT NULL DEFAULT '',
  note_public TEXT NOT NULL DEFAULT '',
  note_private TEXT NOT NULL DEFAULT '',
  stopped_reason TEXT NOT NULL DEFAULT '',
  started_on TEXT NOT NULL,
  decided_at INTEGER,
  decided_on TEXT,
  -- The first day on which it may be heard again after "not yet".
  earliest_again_on TEXT,
  replaces_id TEXT UNIQUE REFERENCES hearing (id),
  created_at INTEGER NOT NULL,
  CHECK ((state = 'decided') = (outcome IS NOT NULL)),
  CHECK ((state = 'decided') = (decided_at IS NOT NULL)),
  CHECK ((decided_at IS NULL) = (decided_on IS NULL)),
  CHECK ((seed IS NULL) = (keys_drawn_json IS NULL)),
  CHECK (state = 'planned' OR state = 'stopped' OR seed IS NOT NULL),
  CHECK (state <> 'stopped' OR length(trim(stopped_reason)) > 0)
) STRICT;
CREATE INDEX hearing_student ON hearing (student_id, rung_id, state);
CREATE INDEX hearing_assessor ON hearing (assessor_id, created_at);
CREATE INDEX hearing_occurrence ON hearing (occurrence_id);
-- One hearing of a student and a rung is under way at a time.
CREATE UNIQUE INDEX hearing_one_under_way ON hearing (student_id, rung_id) WHERE state IN ('planned', 'keys_drawn', 'played');
CREATE TRIGGER hearing_decided_is_fixed BEFORE UPDATE ON hearing WHEN OLD.state IN ('decided', 'stopped')
BEGIN SELECT RAISE(ABORT, 'hearing_fixed'); END;
CREATE TRIGGER hearing_is_kept BEFORE DELETE ON hearing WHEN OLD.state IN ('decided', 'stopped')
BEGIN SELECT RAISE(ABORT, 'hearing_fixed'); END;
-- Who was heard by whom, at what, never changes; keys once drawn are not drawn again.
CREATE TRIGGER hearing_keeps_its_question BEFORE UPDATE ON hearing
WHEN OLD.student_id <> NEW.student_id OR OLD.rung_id <> NEW.rung_id OR OLD.edition_id <> NEW.edition_id OR OLD.assessor_id <> NEW.assessor_id
  OR (OLD.seed IS NOT NULL AND (NEW.seed IS NOT OLD.seed OR NEW.keys_drawn_json IS NOT OLD.keys_drawn_json))
BEGIN SELECT RAISE(ABORT, 'hearing_question_fixed'); END;
CREATE TRIGGER hearing_needs_a_qualified_assessor BEFORE INSERT ON hearing
WHEN NOT EXISTS (
  SELECT 1 FROM qualification q JOIN ladder l ON l.subject_id = q.subject_id
  JOIN rung_text t ON t.rung_id = NEW.rung_id AND t.edition_id = NEW.edition_id
  JOIN level v ON v.id = t.level_id JOIN ladder_edition e ON e.id = t.edition_id AND e.ladder_id = l.id
  WHERE q.person_id = NEW.assessor_id AND v.no BETWEEN q.level_from AND q.level_to
  AND q.granted_on <= NEW.started_on AND (q.ends_on IS NULL OR q.ends_on >= NEW.started_on))
BEGIN SELECT RAISE(ABORT, 'assessor_not_qualified'); END;

-- What was asked and what was played, key by key: the proof behind an outcome.
CREATE TABLE proof (
  id TEXT PRIMARY KEY,
  hearing_id TEXT NOT NULL REFERENCES hearing (id),
  -- Place of the drawn key in the order of the hearing, from 0; a key may be tried again.
  drawn_no INTEGER NOT NULL CHECK (drawn_no >= 0),
  try_no INTEGER NOT NULL DEFAULT 1 CHECK (try_no >= 1),
  -- [{symbol, played, milliseconds, verdict, byEar}], one per chord asked.
  heard_json TEXT NOT NULL CHECK (json_valid(heard_json) AND json_array_length(heard_json) > 0),
  is_heard INTEGER NOT NULL CHECK (is_heard IN (0, 1)),
  source TEXT NOT NULL CHECK (source IN ('midi', 'screen', 'ear')),
  judge_version INTEGER NOT NULL,
  at INTEGER NOT NULL,
  UNIQUE (hearing_id, drawn_no, try_no)
) STRICT;
CREATE TRIGGER proof_needs_an_open_hearing BEFORE INSERT ON proof
WHEN coalesce((SELECT h.state FROM hearing h WHERE h.id = NEW.hearing_id), 'none') NOT IN ('keys_drawn', 'played')
BEGIN SELECT RAISE(ABORT, 'hearing_not_open'); END;
CREATE TRIGGER proof_is_fixed BEFORE UPDATE ON proof BEGIN SELECT RAISE(ABORT, 'proof_fixed'); END;
CREATE TRIGGER proof_is_kept BEFORE DELETE ON proof BEGIN SELECT RAISE(ABORT, 'proof_fixed'); END;

CREATE TABLE hearing_score (
  id TEXT PRIMARY KEY,
  hearing_id TEXT NOT NULL REFERENCES hearing (id),
  criterion TEXT NOT NULL,
  weight_percent INTEGER NOT NULL CHECK (weight_percent BETWEEN 1 AND 100),
  score INTEGER NOT NULL CHECK (score BETWEEN 0 AND 4),
  comment TEXT NOT NULL DEFAULT '',
  UNIQUE (hearing_id, criterion)
) STRICT;
CREATE TRIGGER hearing_score_joins_open_hearings BEFORE INSERT ON hearing_score
WHEN coalesce((SELECT h.state FROM hearing h WHERE h.id = NEW.hearing_id), 'none') IN ('none', 'decided', 'stopped')
BEGIN SELECT RAISE(ABORT, 'hearing_fixed'); END;
CREATE TRIGGER hearing_score_is_fixed BEFORE UPDATE ON hearing_score
WHEN (SELECT h.state FROM hearing h WHERE h.id = OLD.hearing_id) IN ('decided', 'stopped')
BEGIN SELECT RAISE(ABORT, 'hearing_fixed'); END;
CREATE TRIGGER hearing_score_is_kept BEFORE DELETE ON hearing_score
WHEN (SELECT h.state FROM hearing h WHERE h.id = OLD.hearing_id) IN ('decided', 'stopped')
BEGIN SELECT RAISE(ABORT, 'hearing_fixed'); END;

CREATE TABLE lesson_note (
  id TEXT PRIMARY KEY,
  occurrence_id TEXT NOT NULL REFERENCES occurrence (id),
  student_id TEXT NOT NULL REFERENCES person (id),
  did TEXT NOT NULL DEFAULT '',
  next_aim TEXT NOT NULL DEFAULT '',
  -- For staff only.
  note_private TEXT NOT NULL DEFAULT '',
  by_id TEXT NOT NULL REFERENCES person (id),
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  updated_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (occurrence_id, student_id)
) STRICT;
CREATE INDEX lesson_note_student ON lesson_note (student_id, created_at);

CREATE TABLE practice_set (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  occurrence_id TEXT REFERENCES occurrence (id),
  set_by TEXT NOT NULL REFERENCES person (id),
  set_on TEXT NOT NULL,
  due_on TEXT NOT NULL,
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'done', 'replaced')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (set_on <= due_on)
) STRICT;
CREATE INDEX practice_set_student ON practice_set (student_id, due_on);

CREATE TABLE practice_item (
  id TEXT PRIMARY KEY,
  practice_set_id TEXT NOT NULL REFERENCES practice_set (id),
  order_no INTEGER NOT NULL,
  rung_id TEXT REFERENCES rung (id),
  piece TEXT,
  keys_json TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(keys_json)),
  beats_per_minute INTEGER CHECK (beats_per_minute BETWEEN 20 AND 300),
  minutes INTEGER CHECK (minutes BETWEEN 1 AND 120),
  how_right TEXT NOT NULL DEFAULT '',
  UNIQUE (practice_set_id, order_no),
  CHECK (rung_id IS NOT NULL OR piece IS NOT NULL)
) STRICT;

CREATE TABLE practice_log (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  practice_item_id TEXT REFERENCES practice_item (id),
  practised_on TEXT NOT NULL,
  minutes INTEGER NOT NULL CHECK (minutes BETWEEN 1 AND 300),
  how TEXT NOT NULL CHECK (how IN ('timed', 'told')),
  feeling TEXT CHECK (feeling IN ('easy', 'fine', 'hard')),
  note TEXT NOT NULL DEFAULT '',
  at INTEGER NOT NULL
) STRICT;
CREATE INDEX practice_log_student ON practice_log (student_id, practised_on);

CREATE TABLE review_card (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  rung_id TEXT NOT NULL REFERENCES rung (id),
  box INTEGER NOT NULL DEFAULT 1 CHECK (box BETWEEN 1 AND 6),
  due_on TEXT NOT NULL,
  failures_in_row INTEGER NOT NULL DEFAULT 0 CHECK (failures_in_row >= 0),
  UNIQUE (student_id, rung_id)
) STRICT;
CREATE INDEX review_card_due ON review_card (student_id, due_on);
CREATE TABLE review_done (
  id TEXT PRIMARY KEY,
  review_card_id TEXT NOT NULL REFERENCES review_card (id),
  done_on TEXT NOT NULL,
  is_good INTEGER NOT NULL CHECK (is_good IN (0, 1)),
  heard_json TEXT CHECK (heard_json IS NULL OR json_valid(heard_json)),
  at INTEGER NOT NULL
) STRICT;

CREATE TABLE term_report (
  id TEXT PRIMARY KEY,
  student_id TEXT NOT NULL REFERENCES person (id),
  term_id TEXT NOT NULL REFERENCES term (id),
  edition_id TEXT NOT NULL REFERENCES ladder_edition (id),
  state TEXT NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'submitted', 'returned', 'approved', 'published')),
  author_id TEXT NOT NULL REFERENCES person (id),
  approver_id TEXT REFERENCES person (id),
  facts_json TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(facts_json)),
  amends_id TEXT REFERENCES term_report (id),
  published_at INTEGER,
  acknowledged_at INTEGER,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK ((state = 'published') = (published_at IS NOT NULL))
) STRICT;
CREATE UNIQUE INDEX term_report_one ON term_report (student_id, term_id) WHERE amends_id IS NULL;
CREATE TABLE report_section (
  id TEXT PRIMARY KEY,
  term_report_id TEXT NOT NULL REFERENCES term_report (id),
  language TEXT NOT NULL DEFAULT 'en',
  kind TEXT NOT NULL CHECK (kind IN ('can_do', 'next_aim', 'practice', 'teacher', 'at_home')),
  text TEXT NOT NULL,
  UNIQUE (term_report_id, language, kind)
) STRICT;
-- Published is for good, except that the family may say it was read.
CREATE TRIGGER term_report_published_is_fixed BEFORE UPDATE ON term_report
WHEN OLD.state = 'published' AND NOT (
  NEW.state = OLD.state AND NEW.student_id = OLD.student_id AND NEW.term_id = OLD.term_id AND NEW.edition_id = OLD.edition_id
  AND NEW.author_id = OLD.author_id AND NEW.approver_id IS OLD.approver_id AND NEW.facts_json = OLD.facts_json
  AND NEW.amends_id IS OLD.amends_id AND NEW.published_at = OLD.published_at AND OLD.acknowledged_at IS NULL)
BEGIN SELECT RAISE(ABORT, 'report_fixed'); END;
CREATE TRIGGER term_report_is_kept BEFORE DELETE ON term_report WHEN OLD.state = 'published' BEGIN SELECT RAISE(ABORT, 'report_fixed'); END;
CREATE TRIGGER report_section_is_fixed BEFORE UPDATE ON report_section
WHEN (SELECT r.state FROM term_report r WHERE r.id = OLD.term_report_id) = 'published' BEGIN SELECT RAISE(ABORT, 'report_fixed'); END;
CREATE TRIGGER report_section_is_kept BEFORE DELETE ON report_section
WHEN (SELECT r.state FROM term_report r WHERE r.id = OLD.term_report_id) = 'published' BEGIN SELECT RAISE(ABORT, 'report_fixed'); END;
CREATE TRIGGER report_section_joins_unpublished BEFORE INSERT ON report_section
WHEN (SELECT r.state FROM term_report r WHERE r.id = NEW.term_report_id) = 'published' BEGIN SELECT RAISE(ABORT, 'report_fixed'); END;
