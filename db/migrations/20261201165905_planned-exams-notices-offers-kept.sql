-- What was told to whom, and what was answered, is only ever added to.
CREATE TRIGGER evidence_notices_append_only BEFORE UPDATE OR DELETE ON evidence_notices FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER notice_replies_append_only BEFORE UPDATE OR DELETE ON notice_replies FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- An offer is answered once; what was offered stays as it was written.
CREATE FUNCTION keep_custody_offer() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.answer IS NOT NULL
     OR (to_jsonb(NEW) - 'answer' - 'answer_reason' - 'answered_at') IS DISTINCT FROM (to_jsonb(OLD) - 'answer' - 'answer_reason' - 'answered_at') THEN
    RAISE EXCEPTION 'an offer is answered once and otherwise kept as it was written' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER custody_offers_keep BEFORE UPDATE ON custody_offers FOR EACH ROW EXECUTE FUNCTION keep_custody_offer();
--> statement-breakpoint
CREATE TRIGGER custody_offers_no_delete BEFORE DELETE ON custody_offers FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- While an offer waits, the giver holds the item: nobody else takes it over.
CREATE FUNCTION refuse_hand_over_while_offered() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF EXISTS (SELECT 1 FROM custody_offers WHERE item_id = NEW.item_id AND answer IS NULL) THEN
    RAISE EXCEPTION 'the item is offered to somebody who has not answered' USING ERRCODE = 'integrity_constraint_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER custody_records_not_while_offered BEFORE INSERT ON custody_records FOR EACH ROW EXECUTE FUNCTION refuse_hand_over_while_offered();
--> statement-breakpoint
-- A plan may be moved to another day, told to other parties and given its protocol until it is made or cancelled. What is to
-- be done, and by whom, is what the parties were told, and stays.
CREATE FUNCTION keep_planned_exam() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.outcome IS NOT NULL
     OR (to_jsonb(NEW) - ARRAY['planned_at', 'waiting_days', 'tell_roles', 'protocol_attachment_id', 'revision', 'outcome', 'cancel_reason', 'exam_id', 'settled_at', 'settled_by_id'])
        IS DISTINCT FROM (to_jsonb(OLD) - ARRAY['planned_at', 'waiting_days', 'tell_roles', 'protocol_attachment_id', 'revision', 'outcome', 'cancel_reason', 'exam_id', 'settled_at', 'settled_by_id']) THEN
    RAISE EXCEPTION 'a planned examination is settled once, and what is to be done stays as planned' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER planned_exams_keep BEFORE UPDATE ON planned_exams FOR EACH ROW EXECUTE FUNCTION keep_planned_exam();
--> statement-breakpoint
CREATE TRIGGER planned_exams_no_delete BEFORE DELETE ON planned_exams FOR EACH ROW EXECUTE FUNCTION refuse_change();
