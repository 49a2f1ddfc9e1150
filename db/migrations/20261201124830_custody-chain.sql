-- A custody record is only ever closed, once, at the moment of the hand-over; nothing else of it changes and none is removed.
CREATE FUNCTION keep_custody_record() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.to_at IS NOT NULL OR NEW.to_at IS NULL
     OR (to_jsonb(NEW) - 'to_at') IS DISTINCT FROM (to_jsonb(OLD) - 'to_at') THEN
    RAISE EXCEPTION 'a custody record is closed once and otherwise kept as it was written' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER custody_records_keep BEFORE UPDATE ON custody_records FOR EACH ROW EXECUTE FUNCTION keep_custody_record();
--> statement-breakpoint
CREATE TRIGGER custody_records_no_delete BEFORE DELETE ON custody_records FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- When a transaction ends, every item that it touched is in exactly one pair of hands.
CREATE FUNCTION require_one_holder() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  touched uuid := CASE WHEN TG_TABLE_NAME = 'evidence_items' THEN (to_jsonb(NEW) ->> 'id')::uuid ELSE (to_jsonb(NEW) ->> 'item_id')::uuid END;
BEGIN
  IF (SELECT count(*) FROM custody_records WHERE item_id = touched AND to_at IS NULL) <> 1 THEN
    RAISE EXCEPTION 'an item of evidence has exactly one holder at any time' USING ERRCODE = 'integrity_constraint_violation';
  END IF;
  RETURN NULL;
END;
$$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER evidence_items_one_holder AFTER INSERT ON evidence_items DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION require_one_holder();
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER custody_records_one_holder AFTER INSERT OR UPDATE ON custody_records DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION require_one_holder();
--> statement-breakpoint
CREATE TRIGGER evidence_exams_append_only BEFORE UPDATE OR DELETE ON evidence_exams FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- The words of a witness stay as they were taken; only a signed copy and the reading back may be added.
CREATE FUNCTION keep_witness_words() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (to_jsonb(NEW) - 'signed_attachment_id' - 'read_back') IS DISTINCT FROM (to_jsonb(OLD) - 'signed_attachment_id' - 'read_back') THEN
    RAISE EXCEPTION 'the account of a witness is kept as it was taken' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER witness_accounts_keep BEFORE UPDATE ON witness_accounts FOR EACH ROW EXECUTE FUNCTION keep_witness_words();
--> statement-breakpoint
-- What was put together when a finding was signed never changes, and a file made from it is made once.
CREATE FUNCTION keep_finding_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NEW.document IS DISTINCT FROM OLD.document OR NEW.document_hash <> OLD.document_hash OR NEW.finding_id <> OLD.finding_id
     OR (OLD.pdf_key IS NOT NULL AND (NEW.pdf_key IS DISTINCT FROM OLD.pdf_key OR NEW.pdf_sha256 IS DISTINCT FROM OLD.pdf_sha256 OR NEW.pdf_bytes IS DISTINCT FROM OLD.pdf_bytes)) THEN
    RAISE EXCEPTION 'the report of a signed finding is kept as it was made' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER finding_reports_keep BEFORE UPDATE ON finding_reports FOR EACH ROW EXECUTE FUNCTION keep_finding_report();
--> statement-breakpoint
CREATE TRIGGER finding_reports_no_delete BEFORE DELETE ON finding_reports FOR EACH ROW EXECUTE FUNCTION refuse_change();
