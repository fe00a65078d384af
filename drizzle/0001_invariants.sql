-- What must hold whatever the code does: ranges, states, transitions, no overlap, an append-only ledger.
CREATE EXTENSION IF NOT EXISTS btree_gist;
--> statement-breakpoint
ALTER TABLE people
  ADD CONSTRAINT people_role CHECK (role IN ('planner','operator','coordinator','administrator')),
  ADD CONSTRAINT people_email_lower CHECK (email = lower(email) AND email LIKE '%_@_%'),
  ADD CONSTRAINT people_coordinator_authority CHECK ((role = 'coordinator') = (authority_id IS NOT NULL));
--> statement-breakpoint
ALTER TABLE authorities
  ADD CONSTRAINT authorities_kind CHECK (kind IN ('air unit','satellite owner','clearing authority','consenting State')),
  ADD CONSTRAINT authorities_times CHECK (lead_time_min >= 0 AND change_deadline_min >= 0);
--> statement-breakpoint
ALTER TABLE stations
  ADD CONSTRAINT stations_position CHECK (latitude_deg BETWEEN -90 AND 90 AND longitude_deg BETWEEN -180 AND 180 AND altitude_m BETWEEN -500 AND 9000),
  ADD CONSTRAINT stations_elevation CHECK (min_elevation_deg >= 0 AND min_elevation_deg < max_elevation_deg AND max_elevation_deg <= 90),
  ADD CONSTRAINT stations_times CHECK (acquisition_s >= 0 AND guard_s >= 0 AND slew_s >= 0 AND cool_down_s >= 0 AND min_dwell_s > 0 AND max_dwell_s >= min_dwell_s),
  ADD CONSTRAINT stations_age CHECK (element_age_limit_h > 0 AND element_age_limit_h < 1000);
--> statement-breakpoint
ALTER TABLE laser_settings
  ADD CONSTRAINT laser_settings_mode CHECK (mode = 'pulsed'),
  ADD CONSTRAINT laser_settings_ranges CHECK (
    wavelength_nm BETWEEN 200 AND 11000 AND pulse_energy_j > 0 AND pulse_energy_j < 1e7 AND pulse_width_ns > 0 AND pulse_width_ns < 1e6
    AND repetition_rate_hz > 0 AND repetition_rate_hz < 1e6 AND aperture_m > 0 AND aperture_m < 100 AND beam_quality >= 1 AND beam_quality < 100
    AND zenith_transmission > 0 AND zenith_transmission <= 1 AND strehl > 0 AND strehl <= 1 AND jitter_urad >= 0 AND jitter_urad < 1000
    AND wall_plug_efficiency > 0 AND wall_plug_efficiency <= 1);
--> statement-breakpoint
CREATE UNIQUE INDEX laser_settings_one_active ON laser_settings (station_id) WHERE active;
--> statement-breakpoint
ALTER TABLE fragments
  ADD CONSTRAINT fragments_number CHECK (catalog_number IS NOT NULL OR local_number IS NOT NULL),
  ADD CONSTRAINT fragments_catalog_number CHECK (catalog_number BETWEEN 1 AND 999999999),
  ADD CONSTRAINT fragments_body CHECK (mass_kg > 0 AND mass_kg < 1e6 AND area_m2 > 0 AND area_m2 < 1e5);
--> statement-breakpoint
ALTER TABLE protected_objects
  ADD CONSTRAINT protected_objects_class CHECK (class IN ('crewed','payload','optical payload','own')),
  ADD CONSTRAINT protected_objects_catalog_number CHECK (catalog_number BETWEEN 1 AND 999999999),
  ADD CONSTRAINT protected_objects_half_angle CHECK (half_angle_deg > 0 AND half_angle_deg <= 30);
--> statement-breakpoint
-- BETWEEN refuses NaN (it sorts above everything) and both infinities.
ALTER TABLE element_sets
  ADD CONSTRAINT element_sets_one_object CHECK (num_nonnulls(fragment_id, protected_object_id) = 1),
  ADD CONSTRAINT element_sets_finite CHECK (
    epoch_ms BETWEEN -1e14 AND 1e14 AND mean_motion_rev_per_day BETWEEN 1e-6 AND 20 AND eccentricity >= 0 AND eccentricity < 1
    AND inclination_deg BETWEEN 0 AND 180 AND raan_deg BETWEEN 0 AND 360 AND arg_pericenter_deg BETWEEN 0 AND 360
    AND mean_anomaly_deg BETWEEN 0 AND 360 AND bstar BETWEEN -1e6 AND 1e6 AND mean_motion_dot BETWEEN -1e6 AND 1e6
    AND mean_motion_ddot BETWEEN -1e6 AND 1e6),
  ADD CONSTRAINT element_sets_format CHECK (format IN ('tle','omm-json','omm-kvn','omm-xml','omm-csv'));
--> statement-breakpoint
ALTER TABLE sweeps ADD CONSTRAINT sweeps_state CHECK (state IN ('running','done','cancelled'));
--> statement-breakpoint
ALTER TABLE sweep_chunks ADD CONSTRAINT sweep_chunks_state CHECK (state IN ('waiting','done','failed'));
--> statement-breakpoint
ALTER TABLE passes ADD CONSTRAINT passes_order CHECK (rise_at <= culminate_at AND culminate_at <= set_at AND rise_at < set_at);
--> statement-breakpoint
ALTER TABLE beam_crossings ADD CONSTRAINT beam_crossings_order CHECK (from_at < to_at);
--> statement-breakpoint
ALTER TABLE engagements
  ADD CONSTRAINT engagements_state CHECK (state IN ('proposed','cleared','confirmed','fired','scrubbed','lapsed')),
  ADD CONSTRAINT engagements_dwell CHECK (dwell_from < dwell_to AND hold_from <= dwell_from AND dwell_to <= hold_until),
  ADD CONSTRAINT engagements_whole_seconds CHECK (date_trunc('second', dwell_from) = dwell_from AND date_trunc('second', dwell_to) = dwell_to),
  ADD CONSTRAINT engagements_end_reason CHECK (state NOT IN ('scrubbed','lapsed') OR length(btrim(end_reason)) > 0),
  ADD CONSTRAINT engagements_station_free EXCLUDE USING gist (station_id WITH =, tstzrange(hold_from, hold_until, '[)') WITH &&)
    WHERE (state IN ('proposed','cleared','confirmed')),
  ADD CONSTRAINT engagements_fragment_free EXCLUDE USING gist (fragment_id WITH =, tstzrange(dwell_from, dwell_to, '[)') WITH &&)
    WHERE (state IN ('proposed','cleared','confirmed'));
--> statement-breakpoint
CREATE FUNCTION engagement_hold() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  SELECT NEW.dwell_from - make_interval(secs => s.slew_s), NEW.dwell_to + make_interval(secs => s.cool_down_s)
    INTO STRICT NEW.hold_from, NEW.hold_until FROM stations s WHERE s.id = NEW.station_id;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER engagement_hold BEFORE INSERT OR UPDATE OF dwell_from, dwell_to, station_id, hold_from, hold_until ON engagements
  FOR EACH ROW EXECUTE FUNCTION engagement_hold();
--> statement-breakpoint
CREATE FUNCTION engagement_transition() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'INSERT' THEN
    IF NEW.state <> 'proposed' THEN
      RAISE EXCEPTION 'an engagement starts as proposed, not %', NEW.state USING ERRCODE = '23514', CONSTRAINT = 'engagements_transition';
    END IF;
    RETURN NEW;
  END IF;
  IF OLD.state IN ('fired','scrubbed','lapsed') THEN
    RAISE EXCEPTION 'an engagement that is % stays as it is', OLD.state USING ERRCODE = '23514', CONSTRAINT = 'engagements_transition';
  END IF;
  IF NEW.state = OLD.state THEN RETURN NEW; END IF;
  IF (OLD.state, NEW.state) NOT IN (
    ('proposed','cleared'), ('proposed','scrubbed'), ('proposed','lapsed'),
    ('cleared','proposed'), ('cleared','confirmed'), ('cleared','scrubbed'), ('cleared','lapsed'),
    ('confirmed','proposed'), ('confirmed','fired'), ('confirmed','scrubbed'), ('confirmed','lapsed')) THEN
    RAISE EXCEPTION 'no way from % to %', OLD.state, NEW.state USING ERRCODE = '23514', CONSTRAINT = 'engagements_transition';
  END IF;
  IF NEW.state = 'confirmed' AND (SELECT count(DISTINCT c.person_id) FROM confirmations c
       WHERE c.engagement_id = NEW.id AND c.voided_at IS NULL) < 2 THEN
    RAISE EXCEPTION 'two different people confirm an engagement' USING ERRCODE = '23514', CONSTRAINT = 'engagements_two_people';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER engagement_transition BEFORE INSERT OR UPDATE ON engagements
  FOR EACH ROW EXECUTE FUNCTION engagement_transition();
--> statement-breakpoint
CREATE UNIQUE INDEX confirmations_once ON confirmations (engagement_id, person_id) WHERE voided_at IS NULL;
--> statement-breakpoint
ALTER TABLE confirmations ADD CONSTRAINT confirmations_capacity CHECK (capacity IN ('operator','safety officer'));
--> statement-breakpoint
CREATE UNIQUE INDEX attestations_once ON attestations (engagement_id, rule) WHERE voided_at IS NULL;
--> statement-breakpoint
ALTER TABLE attestations ADD CONSTRAINT attestations_statement CHECK (length(btrim(statement)) > 0);
--> statement-breakpoint
ALTER TABLE firing_records
  ADD CONSTRAINT firing_records_outcome CHECK (outcome IN ('fired','in part','not fired')),
  ADD CONSTRAINT firing_records_shutter CHECK (
    CASE WHEN outcome = 'not fired' THEN opened_at IS NULL AND closed_at IS NULL AND pulses = 0 AND delivered_energy_j = 0
         ELSE opened_at < closed_at AND pulses >= 0 AND delivered_energy_j BETWEEN 0 AND 1e12 END);
--> statement-breakpoint
ALTER TABLE notices
  ADD CONSTRAINT notices_kind CHECK (kind IN ('request','revised request','cancellation','completion')),
  ADD CONSTRAINT notices_delivery CHECK (delivery IN ('queued','sent','failed')),
  ADD CONSTRAINT notices_no_line_breaks CHECK (subject !~ '[\r\n]' AND to_email !~ '[\r\n]');
--> statement-breakpoint
CREATE UNIQUE INDEX notices_round_once ON notices (engagement_id, authority_id, sequence);
--> statement-breakpoint
ALTER TABLE answers
  ADD CONSTRAINT answers_notice_fk FOREIGN KEY (notice_id) REFERENCES notices (id),
  ADD CONSTRAINT answers_engagement_fk FOREIGN KEY (engagement_id) REFERENCES engagements (id),
  ADD CONSTRAINT answers_person_fk FOREIGN KEY (answered_by_person_id) REFERENCES people (id),
  ADD CONSTRAINT answers_outcome CHECK (outcome IN ('no objection','no objection with conditions','objection')),
  ADD CONSTRAINT answers_words CHECK (
    (outcome <> 'no objection with conditions' OR length(btrim(conditions)) > 0) AND (outcome <> 'objection' OR length(btrim(reasons)) > 0)),
  ADD CONSTRAINT answers_via CHECK (via IN ('link','desk'));
--> statement-breakpoint
CREATE UNIQUE INDEX answers_one_in_force ON answers (notice_id) WHERE voided_at IS NULL;
--> statement-breakpoint
CREATE FUNCTION ledger_append_only() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'the ledger is append-only' USING ERRCODE = '42501';
END $$;
--> statement-breakpoint
CREATE TRIGGER ledger_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON ledger
  FOR EACH STATEMENT EXECUTE FUNCTION ledger_append_only();
