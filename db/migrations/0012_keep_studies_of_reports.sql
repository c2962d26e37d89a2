-- Studies in an issued report stay what they were, and so do their versions.
CREATE TRIGGER studies_keep_referred BEFORE DELETE ON studies
  FOR EACH ROW EXECUTE FUNCTION keep_referred('study');
--> statement-breakpoint
CREATE TRIGGER study_versions_keep_referred BEFORE DELETE ON study_versions
  FOR EACH ROW EXECUTE FUNCTION keep_referred('study version');
--> statement-breakpoint
CREATE FUNCTION keep_studies_of_issued_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (TG_OP <> 'INSERT' AND is_issued_report(OLD.report_id))
    OR (TG_OP <> 'DELETE' AND is_issued_report(NEW.report_id))
  THEN
    RAISE EXCEPTION 'the studies of an issued report cannot be changed' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
--> statement-breakpoint
CREATE TRIGGER report_studies_keep_issued BEFORE INSERT OR UPDATE OR DELETE ON report_studies
  FOR EACH ROW EXECUTE FUNCTION keep_studies_of_issued_report();
--> statement-breakpoint
-- A version is never changed, only followed by another one.
CREATE FUNCTION keep_study_version() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'version % of a study cannot be changed', OLD.version USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
CREATE TRIGGER study_versions_keep BEFORE UPDATE ON study_versions
  FOR EACH ROW EXECUTE FUNCTION keep_study_version();
