-- Rights, forced row-level security, and the triggers that make the ledger the only way to change stock.
-- Written by hand: drizzle-kit emits none of this. A new table must be added to a later migration like it
-- (tests/integration checks that every table is forced and granted).
GRANT USAGE ON SCHEMA public TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "part" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "part" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "batch" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "batch" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "batch_need" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "batch_need" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "candidate" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "candidate" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "circuit" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "circuit" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "decision" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "decision" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "line" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "line" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "question" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "question" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "revision" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "revision" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "upload" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "upload" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "api_token" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "api_token" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "invitation" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "invitation" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "membership" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "membership" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "one_time_link" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "one_time_link" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "person" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "person" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "workshop" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "workshop" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "offer" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "offer" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "offer_break" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "offer_break" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "order_line" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "order_line" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "order_mail" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "order_mail" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "payment" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "payment" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "purchase_order" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "purchase_order" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "receipt" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "receipt" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "receipt_line" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "receipt_line" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "refund" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "refund" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "supplier" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "supplier" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "audit_event" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT ON "audit_event" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "auth_mail" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "auth_mail" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "counter" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "counter" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "idempotency_key" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "idempotency_key" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "outbox" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "outbox" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "payment_event" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "payment_event" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "progress" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "progress" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "bin" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "bin" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "cabinet" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "cabinet" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "count_entry" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "count_entry" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "lot" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "lot" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "movement" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT ON "movement" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "reservation" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "reservation" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "stock_count" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "stock_count" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "heartbeat" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "heartbeat" TO ohmstead_app;--> statement-breakpoint
ALTER TABLE "rate_limit" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "rate_limit" TO ohmstead_app;--> statement-breakpoint
GRANT USAGE ON ALL SEQUENCES IN SCHEMA public TO ohmstead_app;--> statement-breakpoint

-- Invariant 1: on_hand is the sum of the lot's movements. Inserting a movement is what changes it; the row lock on the
-- lot orders movements, and lot_reserved_within_on_hand refuses one that would take what is promised.
CREATE FUNCTION movement_applies() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  UPDATE lot SET on_hand = on_hand + NEW.quantity
   WHERE workshop_id = NEW.workshop_id AND id = NEW.lot_id AND part_id = NEW.part_id AND bin_id = NEW.bin_id
  RETURNING on_hand INTO NEW.balance_after;
  IF NOT FOUND THEN
    RAISE EXCEPTION 'movement names a lot that is not of this part in this bin' USING ERRCODE = 'foreign_key_violation', CONSTRAINT = 'movement_lot_agrees';
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER movement_applies BEFORE INSERT ON movement FOR EACH ROW EXECUTE FUNCTION movement_applies();--> statement-breakpoint

CREATE FUNCTION movement_is_final() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'the ledger is append-only: enter a correcting movement instead' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'movement_append_only';
END $$;--> statement-breakpoint
CREATE TRIGGER movement_is_final BEFORE UPDATE OR DELETE ON movement FOR EACH ROW EXECUTE FUNCTION movement_is_final();--> statement-breakpoint
CREATE TRIGGER movement_stays BEFORE TRUNCATE ON movement FOR EACH STATEMENT EXECUTE FUNCTION movement_is_final();--> statement-breakpoint

-- Invariant 2: reserved is the sum of the open part of the lot's reservations.
-- AFTER, because the generated column "open" is not yet known in a BEFORE trigger.
CREATE FUNCTION reservation_applies() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  change integer;
BEGIN
  IF TG_OP = 'INSERT' THEN change := NEW.open;
  ELSIF TG_OP = 'DELETE' THEN change := -OLD.open;
  ELSE
    IF NEW.lot_id <> OLD.lot_id THEN
      RAISE EXCEPTION 'a reservation stays with its lot' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'reservation_keeps_lot';
    END IF;
    change := NEW.open - OLD.open;
  END IF;
  IF change <> 0 THEN
    UPDATE lot SET reserved = reserved + change WHERE workshop_id = coalesce(NEW.workshop_id, OLD.workshop_id) AND id = coalesce(NEW.lot_id, OLD.lot_id);
  END IF;
  RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER reservation_applies AFTER INSERT OR UPDATE OR DELETE ON reservation FOR EACH ROW EXECUTE FUNCTION reservation_applies();--> statement-breakpoint

-- Code can't set either figure itself: only the triggers above may (they run one level deeper).
CREATE FUNCTION lot_figures_follow() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'INSERT' THEN
    IF NEW.on_hand <> 0 OR NEW.reserved <> 0 THEN
      RAISE EXCEPTION 'a lot starts empty; a movement fills it' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'lot_figures_follow';
    END IF;
  ELSIF (NEW.on_hand <> OLD.on_hand OR NEW.reserved <> OLD.reserved) AND pg_trigger_depth() < 2 THEN
    RAISE EXCEPTION 'on_hand and reserved follow movements and reservations' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'lot_figures_follow';
  ELSIF NEW.part_id <> OLD.part_id OR NEW.bin_id <> OLD.bin_id THEN
    RAISE EXCEPTION 'a lot stays what and where it is; move its units to another lot' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'lot_stays';
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER lot_figures_follow BEFORE INSERT OR UPDATE ON lot FOR EACH ROW EXECUTE FUNCTION lot_figures_follow();--> statement-breakpoint

-- A frozen revision and its lines never change; "use" and matching live beside them.
CREATE FUNCTION revision_is_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state = 'frozen' THEN
    RAISE EXCEPTION 'a frozen revision never changes: make a new one' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'revision_frozen';
  END IF;
  RETURN coalesce(NEW, OLD);
END $$;--> statement-breakpoint
CREATE TRIGGER revision_is_frozen BEFORE UPDATE OR DELETE ON revision FOR EACH ROW EXECUTE FUNCTION revision_is_frozen();--> statement-breakpoint

CREATE FUNCTION line_is_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  revision_state text;
BEGIN
  SELECT state INTO revision_state FROM revision
   WHERE workshop_id = coalesce(NEW.workshop_id, OLD.workshop_id) AND id = coalesce(NEW.revision_id, OLD.revision_id);
  IF revision_state = 'frozen' AND (TG_OP <> 'UPDATE' OR (to_jsonb(NEW) - 'use') <> (to_jsonb(OLD) - 'use')) THEN
    RAISE EXCEPTION 'a frozen revision never changes: make a new one' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'revision_frozen';
  END IF;
  RETURN coalesce(NEW, OLD);
END $$;--> statement-breakpoint
CREATE TRIGGER line_is_frozen BEFORE INSERT OR UPDATE OR DELETE ON line FOR EACH ROW EXECUTE FUNCTION line_is_frozen();--> statement-breakpoint

-- Invariant 5: received stays within ordered plus the workshop's allowed over-delivery (rounded up to a whole unit).
CREATE FUNCTION order_line_receives() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  allowed_percent integer;
BEGIN
  SELECT over_delivery_percent INTO allowed_percent FROM workshop WHERE id = NEW.workshop_id;
  IF NEW.received > NEW.quantity + ceil(NEW.quantity * coalesce(allowed_percent, 0) / 100.0) THEN
    RAISE EXCEPTION 'more received than ordered and allowed' USING ERRCODE = 'check_violation', CONSTRAINT = 'order_line_over_delivery';
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER order_line_receives BEFORE UPDATE OF received ON order_line FOR EACH ROW EXECUTE FUNCTION order_line_receives();
