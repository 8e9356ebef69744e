-- The school, its sites, its people, who they are to each other and what they may do.
-- Instants are epoch seconds (…_at), local dates are text YYYY-MM-DD (…_on), minutes of the day are …_min.

CREATE TABLE school (
  id INTEGER PRIMARY KEY CHECK (id = 1),
  name TEXT NOT NULL CHECK (length(trim(name)) > 0),
  locale TEXT NOT NULL,
  zone TEXT NOT NULL,
  currency TEXT NOT NULL CHECK (length(currency) = 3),
  week_start INTEGER NOT NULL DEFAULT 1 CHECK (week_start IN (1, 7)),
  public_email TEXT,
  public_phone TEXT,
  -- How chord symbols are written: 'words' is Cmaj7 and Cm7, 'signs' is C△7 and C−7.
  chord_style TEXT NOT NULL DEFAULT 'words' CHECK (chord_style IN ('words', 'signs')),
  safeguarding_contact TEXT,
  is_demo INTEGER NOT NULL DEFAULT 0 CHECK (is_demo IN (0, 1)),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE legal_entity (
  id TEXT PRIMARY KEY,
  name TEXT NOT NULL,
  country TEXT NOT NULL CHECK (length(country) = 2),
  currency TEXT NOT NULL CHECK (length(currency) = 3),
  tax_number TEXT,
  address_lines TEXT NOT NULL DEFAULT '',
  number_prefix TEXT NOT NULL DEFAULT '',
  tax_mode TEXT NOT NULL DEFAULT 'exclusive' CHECK (tax_mode IN ('inclusive', 'exclusive')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE site (
  id TEXT PRIMARY KEY,
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  name TEXT NOT NULL UNIQUE,
  zone TEXT NOT NULL,
  address_lines TEXT NOT NULL DEFAULT '',
  colour TEXT NOT NULL DEFAULT 'petrol',
  order_no INTEGER NOT NULL DEFAULT 0,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE opening_span (
  id TEXT PRIMARY KEY,
  site_id TEXT NOT NULL REFERENCES site (id),
  weekday INTEGER NOT NULL CHECK (weekday BETWEEN 1 AND 7),
  from_min INTEGER NOT NULL CHECK (from_min BETWEEN 0 AND 1439),
  to_min INTEGER NOT NULL CHECK (to_min BETWEEN 1 AND 1440),
  valid_from TEXT NOT NULL DEFAULT '2000-01-01',
  valid_to TEXT,
  CHECK (from_min < to_min)
) STRICT;
CREATE INDEX opening_span_site ON opening_span (site_id, weekday);

CREATE TABLE person (
  id TEXT PRIMARY KEY,
  given_name TEXT NOT NULL,
  family_name TEXT NOT NULL DEFAULT '',
  called_name TEXT,
  born_on TEXT,
  language TEXT NOT NULL DEFAULT 'en',
  pronouns TEXT,
  is_student INTEGER NOT NULL DEFAULT 0 CHECK (is_student IN (0, 1)),
  -- Largest comfortable reach of one hand in semitones; a voicing wider than this is split or re-spread.
  reach_semitones INTEGER NOT NULL DEFAULT 12 CHECK (reach_semitones BETWEEN 5 AND 20),
  state TEXT NOT NULL DEFAULT 'live' CHECK (state IN ('live', 'archived', 'erased')),
  erased_code TEXT,
  external_key TEXT UNIQUE,
  row_version INTEGER NOT NULL DEFAULT 1,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (state <> 'erased' OR (given_name = '' AND family_name = '' AND erased_code IS NOT NULL))
) STRICT;
CREATE INDEX person_name ON person (family_name, given_name);
CREATE INDEX person_student ON person (is_student) WHERE is_student = 1;

CREATE TABLE contact_point (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL CHECK (kind IN ('email', 'phone')),
  value TEXT NOT NULL,
  label TEXT NOT NULL DEFAULT '',
  is_primary INTEGER NOT NULL DEFAULT 1 CHECK (is_primary IN (0, 1)),
  verified_at INTEGER,
  bounced_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (person_id, kind, value)
) STRICT;
CREATE INDEX contact_point_value ON contact_point (kind, value);

CREATE TABLE postal_address (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL UNIQUE REFERENCES person (id),
  lines TEXT NOT NULL,
  city TEXT NOT NULL DEFAULT '',
  region TEXT NOT NULL DEFAULT '',
  postcode TEXT NOT NULL DEFAULT '',
  country TEXT NOT NULL DEFAULT '' CHECK (length(country) IN (0, 2))
) STRICT;

CREATE TABLE user_account (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL UNIQUE REFERENCES person (id),
  -- Lower case; the address a person signs in with.
  email TEXT NOT NULL UNIQUE CHECK (email = lower(email)),
  password_hash TEXT,
  state TEXT NOT NULL DEFAULT 'invited' CHECK (state IN ('invited', 'live', 'disabled')),
  -- Raised at sign-out everywhere, password change, disabling and role change: older cookies stop working at once.
  session_version INTEGER NOT NULL DEFAULT 1,
  active_role TEXT,
  last_sign_in_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

CREATE TABLE role_grant (
  id TEXT PRIMARY KEY,
  user_id TEXT NOT NULL REFERENCES user_account (id),
  role TEXT NOT NULL CHECK (role IN ('owner', 'desk', 'teacher', 'student', 'guardian')),
  is_lead INTEGER NOT NULL DEFAULT 0 CHECK (is_lead IN (0, 1)),
  valid_from TEXT NOT NULL DEFAULT '2000-01-01',
  valid_to TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (user_id, role, valid_from),
  CHECK (is_lead = 0 OR role = 'teacher')
) STRICT;
CREATE TRIGGER role_grant_keeps_an_owner BEFORE DELETE ON role_grant
WHEN OLD.role = 'owner' AND NOT EXISTS (
  SELECT 1 FROM role_grant g JOIN user_account u ON u.id = g.user_id
  WHERE g.role = 'owner' AND g.id <> OLD.id AND g.valid_to IS NULL AND u.state = 'live')
BEGIN SELECT RAISE(ABORT, 'last_owner'); END;
CREATE TRIGGER role_grant_end_keeps_an_owner BEFORE UPDATE ON role_grant
WHEN OLD.role = 'owner' AND OLD.valid_to IS NULL AND (NEW.valid_to IS NOT NULL OR NEW.role <> 'owner') AND NOT EXISTS (
  SELECT 1 FROM role_grant g JOIN user_account u ON u.id = g.user_id
  WHERE g.role = 'owner' AND g.id <> OLD.id AND g.valid_to IS NULL AND u.state = 'live')
BEGIN SELECT RAISE(ABORT, 'last_owner'); END;

-- Invitations and password resets: single use, 32 random bytes, only the SHA-256 is kept.
CREATE TABLE sign_in_link (
  id TEXT PRIMARY KEY,
  user_id TEXT NOT NULL REFERENCES user_account (id),
  purpose TEXT NOT NULL CHECK (purpose IN ('invitation', 'reset')),
  secret_hash TEXT NOT NULL UNIQUE,
  expires_at INTEGER NOT NULL,
  used_at INTEGER,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;

-- Failed sign-ins by account and by network address; survives a restart.
CREATE TABLE sign_in_attempt (
  key TEXT PRIMARY KEY,
  failures INTEGER NOT NULL,
  window_started_at INTEGER NOT NULL,
  total_failures INTEGER NOT NULL DEFAULT 0
) STRICT;

CREATE TABLE relationship (
  id TEXT PRIMARY KEY,
  child_id TEXT NOT NULL REFERENCES person (id),
  adult_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL DEFAULT 'guardian' CHECK (kind IN ('mother', 'father', 'guardian', 'other')),
  has_legal_care INTEGER NOT NULL DEFAULT 1 CHECK (has_legal_care IN (0, 1)),
  may_collect INTEGER NOT NULL DEFAULT 1 CHECK (may_collect IN (0, 1)),
  sees_progress INTEGER NOT NULL DEFAULT 1 CHECK (sees_progress IN (0, 1)),
  sees_schedule INTEGER NOT NULL DEFAULT 1 CHECK (sees_schedule IN (0, 1)),
  gets_messages INTEGER NOT NULL DEFAULT 1 CHECK (gets_messages IN (0, 1)),
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  UNIQUE (child_id, adult_id),
  CHECK (child_id <> adult_id)
) STRICT;
CREATE INDEX relationship_adult ON relationship (adult_id);

CREATE TABLE collection_rule (
  id TEXT PRIMARY KEY,
  child_id TEXT NOT NULL REFERENCES person (id),
  adult_id TEXT REFERENCES person (id),
  adult_name TEXT,
  is_allowed INTEGER NOT NULL CHECK (is_allowed IN (0, 1)),
  reason_private TEXT,
  valid_from TEXT NOT NULL DEFAULT '2000-01-01',
  valid_to TEXT,
  CHECK (adult_id IS NOT NULL OR adult_name IS NOT NULL)
) STRICT;

CREATE TABLE health_note (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL CHECK (kind IN ('allergy', 'medical', 'access')),
  text TEXT NOT NULL,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  ended_at INTEGER
) STRICT;
CREATE INDEX health_note_person ON health_note (person_id);

CREATE TABLE emergency_contact (
  id TEXT PRIMARY KEY,
  child_id TEXT NOT NULL REFERENCES person (id),
  name TEXT NOT NULL,
  phone TEXT NOT NULL,
  order_no INTEGER NOT NULL DEFAULT 1
) STRICT;

-- Newest answer per (person, purpose, giver) counts; any guardian's "no" wins. Answers are followed, never edited.
CREATE TABLE consent (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  given_by_id TEXT REFERENCES person (id),
  purpose TEXT NOT NULL CHECK (purpose IN ('photo_wall', 'photo_web', 'video_family', 'clip_keep', 'name_print', 'home_recording', 'account')),
  answer TEXT NOT NULL CHECK (answer IN ('yes', 'no')),
  text_version TEXT NOT NULL,
  method TEXT NOT NULL DEFAULT 'screen' CHECK (method IN ('screen', 'paper', 'phone', 'import')),
  given_at INTEGER NOT NULL
) STRICT;
CREATE INDEX consent_person ON consent (person_id, purpose, given_at);
CREATE TRIGGER consent_is_followed_not_edited BEFORE UPDATE ON consent BEGIN SELECT RAISE(ABORT, 'consent_fixed'); END;
CREATE TRIGGER consent_is_kept BEFORE DELETE ON consent BEGIN SELECT RAISE(ABORT, 'consent_fixed'); END;

CREATE TABLE file (
  id TEXT PRIMARY KEY,
  sha256 TEXT NOT NULL,
  byte_count INTEGER NOT NULL CHECK (byte_count >= 0),
  mime TEXT NOT NULL,
  original_name TEXT NOT NULL,
  store_path TEXT NOT NULL,
  owner_kind TEXT NOT NULL,
  owner_id TEXT NOT NULL,
  keep_until_on TEXT,
  created_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX file_owner ON file (owner_kind, owner_id);

CREATE TABLE staff_document (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  kind TEXT NOT NULL CHECK (kind IN ('background_check', 'contract', 'insurance', 'qualification')),
  issued_on TEXT NOT NULL,
  expires_on TEXT,
  file_id TEXT REFERENCES file (id),
  verified_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX staff_document_person ON staff_document (person_id, kind);

CREATE TABLE engagement (
  id TEXT PRIMARY KEY,
  person_id TEXT NOT NULL REFERENCES person (id),
  legal_entity_id TEXT NOT NULL REFERENCES legal_entity (id),
  -- A recorded human decision, never inferred by the product.
  kind TEXT NOT NULL CHECK (kind IN ('employee', 'contractor')),
  starts_on TEXT NOT NULL,
  ends_on TEXT,
  work_week_start INTEGER NOT NULL DEFAULT 1 CHECK (work_week_start BETWEEN 1 AND 7),
  colour TEXT NOT NULL DEFAULT 'petrol' CHECK (colour IN ('petrol', 'plum', 'felt', 'brass')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE INDEX engagement_person ON engagement (person_id);

CREATE TABLE incident (
  id TEXT PRIMARY KEY,
  happened_at INTEGER NOT NULL,
  site_id TEXT REFERENCES site (id),
  room_id TEXT,
  kind TEXT NOT NULL,
  text TEXT NOT NULL,
  opened_by TEXT NOT NULL REFERENCES person (id),
  state TEXT NOT NULL DEFAULT 'open' CHECK (state IN ('open', 'closed')),
  created_at INTEGER NOT NULL DEFAULT (unixepoch())
) STRICT;
CREATE TABLE incident_person (
  incident_id TEXT NOT NULL REFERENCES incident (id),
  person_id TEXT NOT NULL REFERENCES person (id),
  PRIMARY KEY (incident_id, person_id)
) STRICT;

-- Policies are dated data: a lesson of 6 October is judged by the rules of 6 October.
CREATE TABLE setting_version (
  id TEXT PRIMARY KEY,
  key TEXT NOT NULL,
  site_id TEXT REFERENCES site (id),
  value_json TEXT NOT NULL CHECK (json_valid(value_json)),
  valid_from TEXT NOT NULL,
  valid_to TEXT,
  source_text TEXT NOT NULL DEFAULT '',
  approved_by TEXT,
  created_at INTEGER NOT NULL DEFAULT (unixepoch()),
  CHECK (valid_to IS NULL OR valid_from < valid_to)
) STRICT;
CREATE INDEX setting_version_key ON setting_version (key, valid_from);
CREATE TRIGGER setting_version_does_not_overlap BEFORE INSERT ON setting_version
WHEN EXISTS (
  SELECT 1 FROM setting_version s WHERE s.key = NEW.key AND s.site_id IS NEW.site_id
  AND s.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(s.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'setting_overlap'); END;
