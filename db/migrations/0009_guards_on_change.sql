-- What may not be written may not be changed into either: the guards of insertion, at every change of what they compare.

CREATE TRIGGER term_change_does_not_overlap BEFORE UPDATE OF starts_on, ends_on ON term
WHEN EXISTS (SELECT 1 FROM term t WHERE t.id <> NEW.id AND t.starts_on <= NEW.ends_on AND NEW.starts_on <= t.ends_on)
BEGIN SELECT RAISE(ABORT, 'term_overlap'); END;

CREATE TRIGGER setting_version_change_does_not_overlap BEFORE UPDATE OF key, site_id, valid_from, valid_to ON setting_version
WHEN EXISTS (
  SELECT 1 FROM setting_version s WHERE s.id <> NEW.id AND s.key = NEW.key AND s.site_id IS NEW.site_id
  AND s.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(s.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'setting_overlap'); END;

CREATE TRIGGER tax_rate_change_does_not_overlap BEFORE UPDATE OF legal_entity_id, tax_class, valid_from, valid_to ON tax_rate
WHEN EXISTS (
  SELECT 1 FROM tax_rate t WHERE t.id <> NEW.id AND t.legal_entity_id = NEW.legal_entity_id AND t.tax_class = NEW.tax_class
  AND t.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(t.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'tax_rate_overlap'); END;

-- Family, kind of charge and first day of a split are fixed already: only its end can come to lie over the next one.
CREATE TRIGGER split_rule_end_does_not_overlap BEFORE UPDATE OF valid_to ON split_rule
WHEN EXISTS (
  SELECT 1 FROM split_rule s WHERE s.id <> NEW.id AND s.family_id = NEW.family_id AND s.charge_kind = NEW.charge_kind
  AND s.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(s.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'split_overlap'); END;

CREATE TRIGGER discount_rule_change_does_not_overlap BEFORE UPDATE OF code, family_id, valid_from, valid_to ON discount_rule
WHEN EXISTS (
  SELECT 1 FROM discount_rule d WHERE d.id <> NEW.id AND d.code = NEW.code AND d.family_id IS NEW.family_id
  AND d.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(d.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'discount_overlap'); END;

CREATE TRIGGER pay_rate_change_does_not_overlap
BEFORE UPDATE OF engagement_id, work_type, lesson_type_id, length_minutes, site_id, seats_from, seats_to, valid_from, valid_to ON pay_rate
WHEN EXISTS (
  SELECT 1 FROM pay_rate r WHERE r.id <> NEW.id AND r.engagement_id = NEW.engagement_id AND r.work_type = NEW.work_type
  AND r.lesson_type_id IS NEW.lesson_type_id AND r.length_minutes IS NEW.length_minutes AND r.site_id IS NEW.site_id
  AND r.seats_from IS NEW.seats_from AND r.seats_to IS NEW.seats_to
  AND r.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(r.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'pay_rate_overlap'); END;

CREATE TRIGGER pay_rule_change_does_not_overlap BEFORE UPDATE OF kind, engagement_kind, valid_from, valid_to ON pay_rule
WHEN EXISTS (
  SELECT 1 FROM pay_rule r WHERE r.id <> NEW.id AND r.kind = NEW.kind AND r.engagement_kind IS NEW.engagement_kind
  AND r.valid_from < coalesce(NEW.valid_to, '9999-12-31') AND NEW.valid_from < coalesce(r.valid_to, '9999-12-31'))
BEGIN SELECT RAISE(ABORT, 'pay_rule_overlap'); END;

CREATE TRIGGER pay_period_change_does_not_overlap BEFORE UPDATE OF legal_entity_id, engagement_kind, starts_on, ends_on ON pay_period
WHEN EXISTS (
  SELECT 1 FROM pay_period p WHERE p.id <> NEW.id AND p.legal_entity_id = NEW.legal_entity_id AND p.engagement_kind = NEW.engagement_kind
  AND p.starts_on <= NEW.ends_on AND NEW.starts_on <= p.ends_on)
BEGIN SELECT RAISE(ABORT, 'pay_period_overlap'); END;

-- A use of a credit is turned back once and for good; its minutes and its lesson stay as they were written.
CREATE TRIGGER credit_use_is_followed BEFORE UPDATE OF credit_id, seat_id, minutes ON make_up_use
BEGIN SELECT RAISE(ABORT, 'credit_use_fixed'); END;
CREATE TRIGGER credit_use_stays_reversed BEFORE UPDATE OF reversed_at ON make_up_use
WHEN OLD.reversed_at IS NOT NULL AND NEW.reversed_at IS NOT OLD.reversed_at
BEGIN SELECT RAISE(ABORT, 'credit_use_fixed'); END;
CREATE TRIGGER credit_use_is_kept BEFORE DELETE ON make_up_use
BEGIN SELECT RAISE(ABORT, 'credit_use_fixed'); END;

-- A reply that arrives with seats already granted fills the hall as one that is granted them later.
CREATE TRIGGER recital_hall_is_not_over_full_at_reply BEFORE INSERT ON recital_reply
WHEN NEW.seats_granted > 0 AND (
  SELECT coalesce(sum(r.seats_granted), 0) FROM recital_reply r WHERE r.recital_id = NEW.recital_id) + NEW.seats_granted
  + (SELECT c.staff_count FROM recital c WHERE c.id = NEW.recital_id)
  + (SELECT count(DISTINCT p.person_id) FROM item_performer p JOIN programme_item i ON i.id = p.item_id
     WHERE i.recital_id = NEW.recital_id AND i.state <> 'withdrawn')
  > (SELECT c.person_limit FROM recital c WHERE c.id = NEW.recital_id)
BEGIN SELECT RAISE(ABORT, 'hall_full'); END;
