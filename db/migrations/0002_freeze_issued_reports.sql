-- An issued report cannot change: what was signed stays what it was, whoever holds the connection.
CREATE FUNCTION is_issued_report(report uuid) RETURNS boolean LANGUAGE sql STABLE AS $$
  SELECT EXISTS (SELECT 1 FROM reports WHERE id = report AND status IN ('issued', 'superseded'))
$$;
--> statement-breakpoint
CREATE FUNCTION keep_issued_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.status NOT IN ('issued', 'superseded') THEN
    RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
  END IF;
  IF TG_OP = 'DELETE' THEN
    RAISE EXCEPTION 'report % is issued and cannot be deleted', OLD.id USING ERRCODE = 'restrict_violation';
  END IF;
  -- Being superseded by a later revision is the one step that an issued report can still take.
  IF NEW.status NOT IN ('issued', 'superseded')
    OR (OLD.status = 'superseded' AND NEW.status = 'issued')
    OR (to_jsonb(NEW) - 'status' - 'updated_at') IS DISTINCT FROM (to_jsonb(OLD) - 'status' - 'updated_at')
  THEN
    RAISE EXCEPTION 'report % is issued and cannot be changed', OLD.id USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END
$$;
--> statement-breakpoint
CREATE TRIGGER reports_keep_issued BEFORE UPDATE OR DELETE ON reports
  FOR EACH ROW EXECUTE FUNCTION keep_issued_report();
--> statement-breakpoint
CREATE FUNCTION keep_verdicts_of_issued_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (TG_OP <> 'INSERT' AND is_issued_report(OLD.report_id))
    OR (TG_OP <> 'DELETE' AND is_issued_report(NEW.report_id))
  THEN
    RAISE EXCEPTION 'the verdicts of an issued report cannot be changed' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
--> statement-breakpoint
CREATE TRIGGER report_verdicts_keep_issued BEFORE INSERT OR UPDATE OR DELETE ON report_verdicts
  FOR EACH ROW EXECUTE FUNCTION keep_verdicts_of_issued_report();
--> statement-breakpoint
CREATE FUNCTION keep_events_of_issued_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF is_issued_report(OLD.report_id) THEN
    RAISE EXCEPTION 'what was done with an issued report stays on record' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
--> statement-breakpoint
CREATE TRIGGER report_events_keep_issued BEFORE UPDATE OR DELETE ON report_events
  FOR EACH ROW EXECUTE FUNCTION keep_events_of_issued_report();
--> statement-breakpoint
CREATE FUNCTION keep_verdict() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF EXISTS (SELECT 1 FROM report_verdicts WHERE verdict_id = OLD.id AND is_issued_report(report_id)) THEN
    RAISE EXCEPTION 'verdict % stands in an issued report', OLD.id USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
--> statement-breakpoint
CREATE TRIGGER verdicts_keep_issued BEFORE UPDATE OR DELETE ON verdicts
  FOR EACH ROW EXECUTE FUNCTION keep_verdict();
