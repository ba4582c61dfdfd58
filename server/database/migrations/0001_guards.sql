-- Who may see and change what. The service connects as anionary_app, which owns nothing and passes no row that a
-- policy here does not let through. Each transaction says who asks: a person, a review link, or the system itself.
CREATE SCHEMA guard;
--> statement-breakpoint
CREATE FUNCTION guard.person() RETURNS uuid LANGUAGE sql STABLE SET search_path = '' AS
$$ SELECT nullif(current_setting('anionary.person', true), '')::uuid $$;
--> statement-breakpoint
CREATE FUNCTION guard.is_system() RETURNS boolean LANGUAGE sql STABLE SET search_path = '' AS
$$ SELECT coalesce(current_setting('anionary.system', true), '') <> '' $$;
--> statement-breakpoint
-- The functions below read membership past row-level security (they belong to the owner), so policies never recurse.
CREATE FUNCTION guard.is_admin() RETURNS boolean LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT EXISTS (SELECT FROM public.person_site_role WHERE person_id = guard.person() AND role = 'admin') $$;
--> statement-breakpoint
CREATE FUNCTION guard.own_labs() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT lab_id FROM public.membership WHERE person_id = guard.person() $$;
--> statement-breakpoint
CREATE FUNCTION guard.seen_projects() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT project_id FROM public.project_member WHERE person_id = guard.person() $$;
--> statement-breakpoint
CREATE FUNCTION guard.edited_projects() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT project_id FROM public.project_member WHERE person_id = guard.person() AND role IN ('owner', 'editor') $$;
--> statement-breakpoint
CREATE FUNCTION guard.owned_projects() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT project_id FROM public.project_member WHERE person_id = guard.person() AND role = 'owner' $$;
--> statement-breakpoint
CREATE FUNCTION guard.seen_labs() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT guard.own_labs()
   UNION SELECT lab_id FROM public.project_lab WHERE project_id IN (SELECT guard.seen_projects()) $$;
--> statement-breakpoint
CREATE FUNCTION guard.seen_persons() RETURNS SETOF uuid LANGUAGE sql STABLE SECURITY DEFINER SET search_path = '' AS
$$ SELECT guard.person()
   UNION SELECT person_id FROM public.membership WHERE lab_id IN (SELECT guard.own_labs())
   UNION SELECT person_id FROM public.project_member WHERE project_id IN (SELECT guard.seen_projects()) $$;
--> statement-breakpoint
CREATE FUNCTION guard.refuse_change() RETURNS trigger LANGUAGE plpgsql SET search_path = '' AS
$$ BEGIN
  RAISE EXCEPTION '% is append-only: % refused', tg_table_name, tg_op USING ERRCODE = 'restrict_violation';
END $$;
--> statement-breakpoint
-- A project is never without an owner: whoever makes it is its first.
CREATE FUNCTION guard.own_new_project() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = '' AS
$$ BEGIN
  INSERT INTO public.project_member (project_id, person_id, role) VALUES (new.id, new.created_by, 'owner');
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER own_new_project AFTER INSERT ON project FOR EACH ROW EXECUTE FUNCTION guard.own_new_project();
--> statement-breakpoint
DO $$
DECLARE name text;
BEGIN
  FOREACH name IN ARRAY ARRAY['series_revision', 'reading', 'revision_reading', 'fit', 'fit_revision', 'fit_blank', 'fit_result', 'audit_event'] LOOP
    EXECUTE format('CREATE TRIGGER append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON %I FOR EACH STATEMENT EXECUTE FUNCTION guard.refuse_change()', name);
  END LOOP;
END $$;
--> statement-breakpoint

-- People and labs
CREATE POLICY read ON person FOR SELECT USING (guard.is_system() OR id IN (SELECT guard.seen_persons()) OR guard.is_admin());
--> statement-breakpoint
CREATE POLICY door ON credential USING (guard.is_system());
--> statement-breakpoint
CREATE POLICY read ON person_site_role FOR SELECT USING (guard.is_system() OR person_id = guard.person() OR guard.is_admin());
--> statement-breakpoint
CREATE POLICY read ON lab FOR SELECT USING (id IN (SELECT guard.seen_labs()) OR guard.is_admin());
--> statement-breakpoint
CREATE POLICY read ON membership FOR SELECT USING (person_id = guard.person() OR lab_id IN (SELECT guard.own_labs()) OR guard.is_admin());
--> statement-breakpoint

-- The door: sessions, misses, counted requests
CREATE POLICY door ON session USING (guard.is_system());
--> statement-breakpoint
CREATE POLICY door ON sign_in_attempt USING (guard.is_system());
--> statement-breakpoint
CREATE POLICY door ON rate_limit USING (guard.is_system());
--> statement-breakpoint

-- Projects
CREATE POLICY read ON project FOR SELECT USING (id IN (SELECT guard.seen_projects()));
--> statement-breakpoint
CREATE POLICY make ON project FOR INSERT WITH CHECK (created_by = guard.person());
--> statement-breakpoint
CREATE POLICY change ON project FOR UPDATE USING (id IN (SELECT guard.owned_projects()));
--> statement-breakpoint
CREATE POLICY read ON project_lab FOR SELECT USING (project_id IN (SELECT guard.seen_projects()));
--> statement-breakpoint
CREATE POLICY manage ON project_lab USING (project_id IN (SELECT guard.owned_projects()));
--> statement-breakpoint
CREATE POLICY read ON project_member FOR SELECT USING (project_id IN (SELECT guard.seen_projects()));
--> statement-breakpoint
CREATE POLICY manage ON project_member USING (project_id IN (SELECT guard.owned_projects()));
--> statement-breakpoint

-- Instruments belong to a lab and are seen by every project it takes part in
CREATE POLICY read ON instrument FOR SELECT USING (lab_id IN (SELECT guard.seen_labs()));
--> statement-breakpoint
CREATE POLICY make ON instrument FOR INSERT WITH CHECK (lab_id IN (SELECT guard.own_labs()));
--> statement-breakpoint
CREATE POLICY change ON instrument FOR UPDATE USING (lab_id IN (SELECT guard.own_labs()));
--> statement-breakpoint

-- What belongs to a project: members read, owners and editors add; headers may change, history may not
DO $$
DECLARE name text;
BEGIN
  FOREACH name IN ARRAY ARRAY['sample', 'stock', 'campaign', 'batch', 'series', 'series_revision', 'reading', 'revision_reading',
    'fit', 'fit_revision', 'fit_blank', 'fit_result', 'upload'] LOOP
    EXECUTE format('CREATE POLICY read ON %I FOR SELECT USING (project_id IN (SELECT guard.seen_projects()))', name);
    EXECUTE format('CREATE POLICY make ON %I FOR INSERT WITH CHECK (project_id IN (SELECT guard.edited_projects()))', name);
  END LOOP;
  FOREACH name IN ARRAY ARRAY['sample', 'stock', 'campaign', 'batch', 'series'] LOOP
    EXECUTE format('CREATE POLICY change ON %I FOR UPDATE USING (project_id IN (SELECT guard.edited_projects()))', name);
  END LOOP;
END $$;
--> statement-breakpoint
-- History carries the name of whoever asks, and of nobody else
CREATE POLICY signed ON series_revision AS RESTRICTIVE FOR INSERT WITH CHECK (made_by = guard.person());
--> statement-breakpoint
CREATE POLICY signed ON fit AS RESTRICTIVE FOR INSERT WITH CHECK (made_by = guard.person());
--> statement-breakpoint
CREATE POLICY signed ON upload AS RESTRICTIVE FOR INSERT WITH CHECK (person_id = guard.person());
--> statement-breakpoint

-- Jobs, drafts, the trail
CREATE POLICY read ON job FOR SELECT USING (guard.is_system() OR person_id = guard.person() OR project_id IN (SELECT guard.seen_projects()));
--> statement-breakpoint
CREATE POLICY make ON job FOR INSERT WITH CHECK (person_id = guard.person() AND (project_id IS NULL OR project_id IN (SELECT guard.edited_projects())));
--> statement-breakpoint
CREATE POLICY change ON job FOR UPDATE USING (guard.is_system() OR person_id = guard.person());
--> statement-breakpoint
CREATE POLICY own ON draft USING (person_id = guard.person());
--> statement-breakpoint
CREATE POLICY read ON audit_event FOR SELECT USING (person_id = guard.person() OR project_id IN (SELECT guard.seen_projects()) OR guard.is_admin());
--> statement-breakpoint
CREATE POLICY make ON audit_event FOR INSERT WITH CHECK (guard.is_system() OR (person_id = guard.person() AND (project_id IS NULL OR project_id IN (SELECT guard.seen_projects()))));
--> statement-breakpoint

-- What anionary_app may try at all; no TRUNCATE anywhere, DELETE only where forgetting is the point
REVOKE ALL ON SCHEMA public FROM PUBLIC;
--> statement-breakpoint
REVOKE ALL ON ALL FUNCTIONS IN SCHEMA guard FROM PUBLIC;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public, guard, drizzle TO anionary_app;
--> statement-breakpoint
GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA guard TO anionary_app;
--> statement-breakpoint
GRANT SELECT ON drizzle.__drizzle_migrations TO anionary_app;
--> statement-breakpoint
GRANT SELECT ON person, person_site_role, lab, membership, credential TO anionary_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON series_revision, reading, revision_reading, fit, fit_revision, fit_blank, fit_result, audit_event, upload TO anionary_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON project, sample, stock, instrument, campaign, batch, series, session, job TO anionary_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON project_lab, project_member, draft, sign_in_attempt, rate_limit TO anionary_app;
