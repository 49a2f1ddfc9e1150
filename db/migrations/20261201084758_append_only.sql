-- The log, the inputs and results of finished reconstructions, signed findings and approved releases never change.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '% rows are only ever added', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
END;
$$;
--> statement-breakpoint
CREATE TRIGGER log_entries_append_only BEFORE UPDATE OR DELETE ON log_entries FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER log_entries_no_truncate BEFORE TRUNCATE ON log_entries FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE FUNCTION keep_finished_reconstruction() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NEW.input IS DISTINCT FROM OLD.input OR NEW.input_hash <> OLD.input_hash
     OR (OLD.state = 'done' AND (NEW.result IS DISTINCT FROM OLD.result OR NEW.result_hash IS DISTINCT FROM OLD.result_hash OR NEW.state <> 'done')) THEN
    RAISE EXCEPTION 'a reconstruction keeps its input and its result' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER reconstructions_keep BEFORE UPDATE ON reconstructions FOR EACH ROW EXECUTE FUNCTION keep_finished_reconstruction();
--> statement-breakpoint
CREATE FUNCTION keep_signed_finding() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state = 'signed' THEN
    RAISE EXCEPTION 'a signed finding is kept as it was signed' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER findings_keep BEFORE UPDATE ON findings FOR EACH ROW EXECUTE FUNCTION keep_signed_finding();
--> statement-breakpoint
CREATE FUNCTION keep_release() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NEW.released IS DISTINCT FROM OLD.released OR NEW.withheld IS DISTINCT FROM OLD.withheld
     OR NEW.released_hash <> OLD.released_hash OR NEW.number <> OLD.number
     OR (OLD.state = 'released' AND NEW.files IS DISTINCT FROM OLD.files) THEN
    RAISE EXCEPTION 'a release keeps what was frozen in it' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END;
$$;
--> statement-breakpoint
CREATE TRIGGER releases_keep BEFORE UPDATE ON releases FOR EACH ROW EXECUTE FUNCTION keep_release();
