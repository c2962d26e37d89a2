-- What an issued report refers to cannot be deleted, so that it can be shown years later.
CREATE FUNCTION keep_referred() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF EXISTS (SELECT 1 FROM report_references WHERE target_id = OLD.id AND is_issued_report(report_id)) THEN
    RAISE EXCEPTION '% % stands in an issued report and cannot be deleted', TG_ARGV[0], OLD.id
      USING ERRCODE = 'restrict_violation', CONSTRAINT = 'report_references_kept';
  END IF;
  RETURN OLD;
END
$$;
--> statement-breakpoint
CREATE TRIGGER recordings_keep_referred BEFORE DELETE ON recordings
  FOR EACH ROW EXECUTE FUNCTION keep_referred('recording');
--> statement-breakpoint
CREATE TRIGGER analyses_keep_referred BEFORE DELETE ON analyses
  FOR EACH ROW EXECUTE FUNCTION keep_referred('analysis');
--> statement-breakpoint
CREATE TRIGGER notes_keep_referred BEFORE DELETE ON notes
  FOR EACH ROW EXECUTE FUNCTION keep_referred('note');
--> statement-breakpoint
CREATE TRIGGER limit_sets_keep_referred BEFORE DELETE ON limit_sets
  FOR EACH ROW EXECUTE FUNCTION keep_referred('limit set');
--> statement-breakpoint
CREATE TRIGGER equipment_keep_referred BEFORE DELETE ON equipment
  FOR EACH ROW EXECUTE FUNCTION keep_referred('equipment');
--> statement-breakpoint
CREATE TRIGGER operating_modes_keep_referred BEFORE DELETE ON operating_modes
  FOR EACH ROW EXECUTE FUNCTION keep_referred('operating mode');
--> statement-breakpoint
CREATE TRIGGER instruments_keep_referred BEFORE DELETE ON instruments
  FOR EACH ROW EXECUTE FUNCTION keep_referred('instrument');
--> statement-breakpoint
CREATE TRIGGER calibrations_keep_referred BEFORE DELETE ON calibrations
  FOR EACH ROW EXECUTE FUNCTION keep_referred('calibration');
--> statement-breakpoint
CREATE TRIGGER measuring_chains_keep_referred BEFORE DELETE ON measuring_chains
  FOR EACH ROW EXECUTE FUNCTION keep_referred('measuring chain');
--> statement-breakpoint
CREATE FUNCTION keep_references_of_issued_report() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF is_issued_report(OLD.report_id) THEN
    RAISE EXCEPTION 'what an issued report refers to stays on record' USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
END
$$;
--> statement-breakpoint
CREATE TRIGGER report_references_keep_issued BEFORE UPDATE OR DELETE ON report_references
  FOR EACH ROW EXECUTE FUNCTION keep_references_of_issued_report();
--> statement-breakpoint
-- Reports that were issued before references were kept.
INSERT INTO report_references (report_id, target_id, kind)
SELECT DISTINCT r.id, t.target_id, t.kind
FROM reports r
JOIN report_verdicts rv ON rv.report_id = r.id
JOIN verdicts v ON v.id = rv.verdict_id
JOIN analyses a ON a.id = v.analysis_id
LEFT JOIN limit_sets l ON l.id::text = v.limit_set_id
CROSS JOIN LATERAL (VALUES (a.recording_id, 'recording'), (a.id, 'analysis'), (l.id, 'limit-set')) AS t (target_id, kind)
WHERE r.status IN ('issued', 'superseded') AND t.target_id IS NOT NULL;
