-- Who may see and change what 0002 adds; the rules are those of 0001.
DO $$
DECLARE name text;
BEGIN
  FOREACH name IN ARRAY ARRAY['batch_revision', 'batch_revision_reading'] LOOP
    EXECUTE format('CREATE TRIGGER append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON %I FOR EACH STATEMENT EXECUTE FUNCTION guard.refuse_change()', name);
  END LOOP;
  FOREACH name IN ARRAY ARRAY['batch_revision', 'batch_revision_reading', 'table_import'] LOOP
    EXECUTE format('CREATE POLICY read ON %I FOR SELECT USING (project_id IN (SELECT guard.seen_projects()))', name);
    EXECUTE format('CREATE POLICY make ON %I FOR INSERT WITH CHECK (project_id IN (SELECT guard.edited_projects()))', name);
  END LOOP;
END $$;
--> statement-breakpoint
CREATE POLICY change ON table_import FOR UPDATE USING (project_id IN (SELECT guard.edited_projects()));
--> statement-breakpoint
CREATE POLICY signed ON batch_revision AS RESTRICTIVE FOR INSERT WITH CHECK (made_by = guard.person());
--> statement-breakpoint
CREATE POLICY signed ON table_import AS RESTRICTIVE FOR INSERT WITH CHECK (person_id = guard.person());
--> statement-breakpoint
-- How a lab's files are read is the lab's own knowledge
CREATE POLICY read ON recipe FOR SELECT USING (lab_id IN (SELECT guard.own_labs()));
--> statement-breakpoint
CREATE POLICY make ON recipe FOR INSERT WITH CHECK (lab_id IN (SELECT guard.own_labs()) AND made_by = guard.person());
--> statement-breakpoint
CREATE POLICY change ON recipe FOR UPDATE USING (lab_id IN (SELECT guard.own_labs()));
--> statement-breakpoint
CREATE POLICY forget ON recipe FOR DELETE USING (lab_id IN (SELECT guard.own_labs()));
--> statement-breakpoint
CREATE POLICY own ON project_visit USING (person_id = guard.person()) WITH CHECK (person_id = guard.person() AND project_id IN (SELECT guard.seen_projects()));
--> statement-breakpoint
-- Blanks that were there before batches had revisions become each batch's first
INSERT INTO batch_revision (id, project_id, batch_id, number, summary, made_by, created_at)
SELECT gen_random_uuid(), batch.project_id, batch.id, 1, 'blanks as first entered', project.created_by, batch.created_at
FROM batch JOIN project ON project.id = batch.project_id
WHERE EXISTS (SELECT FROM reading WHERE reading.batch_id = batch.id AND reading.series_id IS NULL);
--> statement-breakpoint
INSERT INTO batch_revision_reading (project_id, revision_id, reading_id, number)
SELECT reading.project_id, batch_revision.id, reading.id, row_number() OVER (PARTITION BY reading.batch_id ORDER BY reading.id)
FROM reading JOIN batch_revision ON batch_revision.batch_id = reading.batch_id
WHERE reading.series_id IS NULL;
--> statement-breakpoint
GRANT SELECT, INSERT ON batch_revision, batch_revision_reading TO anionary_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON table_import, project_visit TO anionary_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON recipe TO anionary_app;
