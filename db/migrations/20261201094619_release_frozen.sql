-- A release is frozen from the moment it is prepared: only its approval and its withdrawal are still written.
CREATE OR REPLACE FUNCTION keep_release() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NEW.id <> OLD.id OR NEW.case_id <> OLD.case_id OR NEW.number <> OLD.number OR NEW.audience <> OLD.audience
     OR NEW.recipient_organisation_id <> OLD.recipient_organisation_id OR NEW.prepared_by_id <> OLD.prepared_by_id
     OR NEW.released IS DISTINCT FROM OLD.released OR NEW.withheld IS DISTINCT FROM OLD.withheld OR NEW.released_hash <> OLD.released_hash
     OR NEW.files IS DISTINCT FROM OLD.files OR NEW.decisions IS DISTINCT FROM OLD.decisions
     OR NEW.change_note <> OLD.change_note OR NEW.expires_at <> OLD.expires_at OR NEW.created_at <> OLD.created_at THEN
    RAISE EXCEPTION 'a release keeps what was frozen in it' USING ERRCODE = 'restrict_violation';
  END IF;
  IF OLD.state = 'withdrawn' OR (OLD.state = 'released' AND NEW.state <> 'withdrawn') THEN
    RAISE EXCEPTION 'a release that went out can only be withdrawn, and a withdrawn one does not come back' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER releases_no_delete BEFORE DELETE ON releases FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER release_openings_append_only BEFORE UPDATE OR DELETE ON release_openings FOR EACH ROW EXECUTE FUNCTION refuse_change();
