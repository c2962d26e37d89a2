-- Names the reason as the other refusals do, so that who deletes a recording is told it.
CREATE OR REPLACE FUNCTION keep_verdict() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF EXISTS (SELECT 1 FROM report_verdicts WHERE verdict_id = OLD.id AND is_issued_report(report_id)) THEN
    RAISE EXCEPTION 'verdict % stands in an issued report', OLD.id
      USING ERRCODE = 'restrict_violation', CONSTRAINT = 'report_references_kept';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
