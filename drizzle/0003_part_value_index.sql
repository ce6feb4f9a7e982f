DROP INDEX "part_by_value";--> statement-breakpoint
ALTER TABLE "part" ADD COLUMN "value_key" double precision GENERATED ALWAYS AS (value::double precision) STORED;--> statement-breakpoint
CREATE INDEX "part_by_value" ON "part" USING btree ("workshop_id","kind","value_key");