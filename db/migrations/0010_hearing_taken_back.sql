-- For ten minutes the one who decided a hearing may take the decision back. The decided row stays as it is; another
-- hearing of the same student, rung, assessor and keys follows it, once. After that only a re-check follows.

CREATE TRIGGER hearing_follows_its_own_in_time BEFORE INSERT ON hearing
WHEN NEW.replaces_id IS NOT NULL AND NOT EXISTS (
  SELECT 1 FROM hearing h WHERE h.id = NEW.replaces_id AND h.state = 'decided' AND h.student_id = NEW.student_id AND h.rung_id = NEW.rung_id
  AND h.edition_id = NEW.edition_id AND h.assessor_id = NEW.assessor_id AND h.seed IS NEW.seed AND h.keys_drawn_json IS NEW.keys_drawn_json
  AND NEW.created_at >= h.decided_at AND NEW.created_at < h.decided_at + 600)
BEGIN SELECT RAISE(ABORT, 'hearing_not_taken_back'); END;
CREATE TRIGGER hearing_keeps_what_it_follows BEFORE UPDATE OF replaces_id ON hearing WHEN NEW.replaces_id IS NOT OLD.replaces_id
BEGIN SELECT RAISE(ABORT, 'hearing_question_fixed'); END;

-- A re-check that was asked for is answered by a hearing, not rewritten.
CREATE TRIGGER recheck_request_is_fixed BEFORE UPDATE OF student_id, rung_id, by_id, asked_on, at ON recheck_request
BEGIN SELECT RAISE(ABORT, 'recheck_fixed'); END;
CREATE TRIGGER recheck_request_says_why BEFORE INSERT ON recheck_request WHEN length(trim(NEW.reason_private)) = 0
BEGIN SELECT RAISE(ABORT, 'recheck_without_reason'); END;
