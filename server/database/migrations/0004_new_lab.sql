-- Somebody who is in no lab may begin one, and leads it. Everybody else is brought in by a lab.
CREATE FUNCTION guard.begin_lab(new_id uuid, new_name text) RETURNS void LANGUAGE plpgsql VOLATILE SECURITY DEFINER SET search_path = '' AS $$
BEGIN
  IF guard.person() IS NULL OR EXISTS (SELECT FROM public.membership WHERE person_id = guard.person()) THEN
    RAISE EXCEPTION 'only somebody without a lab begins one' USING ERRCODE = 'insufficient_privilege';
  END IF;
  INSERT INTO public.lab (id, name) VALUES (new_id, new_name);
  INSERT INTO public.membership (lab_id, person_id, role) VALUES (new_id, guard.person(), 'lead');
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION guard.begin_lab(uuid, text) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION guard.begin_lab(uuid, text) TO anionary_app;
