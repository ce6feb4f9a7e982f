CREATE TABLE "count_bin" (
	"workshop_id" uuid NOT NULL,
	"count_id" uuid NOT NULL,
	"bin_id" uuid NOT NULL,
	"looked_at" timestamp with time zone,
	"looked_by" uuid,
	CONSTRAINT "count_bin_workshop_id_count_id_bin_id_pk" PRIMARY KEY("workshop_id","count_id","bin_id"),
	CONSTRAINT "count_bin_looked" CHECK (("count_bin"."looked_at" is null) = ("count_bin"."looked_by" is null))
);
--> statement-breakpoint
ALTER TABLE "count_bin" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "bin" ADD COLUMN "doubtful" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "count_bin" ADD CONSTRAINT "count_bin_workshop_id_count_id_stock_count_workshop_id_id_fk" FOREIGN KEY ("workshop_id","count_id") REFERENCES "public"."stock_count"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "count_bin" ADD CONSTRAINT "count_bin_workshop_id_bin_id_bin_workshop_id_id_fk" FOREIGN KEY ("workshop_id","bin_id") REFERENCES "public"."bin"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "count_bin_by_bin" ON "count_bin" USING btree ("workshop_id","bin_id");--> statement-breakpoint
CREATE INDEX "movement_by_bin" ON "movement" USING btree ("workshop_id","bin_id","sequence");--> statement-breakpoint
CREATE INDEX "movement_by_time" ON "movement" USING btree ("workshop_id","at");--> statement-breakpoint
CREATE POLICY "own_workshop" ON "count_bin" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
ALTER TABLE "count_bin" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "count_bin" TO ohmstead_app;
