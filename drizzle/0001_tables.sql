CREATE TABLE "part" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	"kind" text NOT NULL,
	"part_number" text,
	"family" text,
	"value" numeric,
	"unit" text,
	"tolerance_percent" numeric,
	"rated_volts" numeric,
	"rated_watts" numeric,
	"rated_amperes" numeric,
	"dielectric" text,
	"technology" text,
	"taper" text,
	"mounting" text,
	"package" text,
	"safety" boolean DEFAULT false NOT NULL,
	"stock_unit" text DEFAULT 'piece' NOT NULL,
	"reorder_point" integer,
	"reorder_quantity" integer,
	"part_key" text GENERATED ALWAYS AS (upper(regexp_replace(part_number, '[^A-Za-z0-9]', '', 'g'))) STORED,
	"version" integer DEFAULT 1 NOT NULL,
	"retired_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "part_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "part_value_has_unit" CHECK (("part"."value" is null) = ("part"."unit" is null)),
	CONSTRAINT "part_value_not_negative" CHECK ("part"."value" is null or "part"."value" >= 0),
	CONSTRAINT "part_stock_unit" CHECK ("part"."stock_unit" in ('piece', 'mm', 'mg')),
	CONSTRAINT "part_reorder" CHECK (("part"."reorder_point" is null or "part"."reorder_point" >= 0) and ("part"."reorder_quantity" is null or "part"."reorder_quantity" > 0))
);
--> statement-breakpoint
ALTER TABLE "part" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "batch" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"number" text NOT NULL,
	"revision_id" uuid NOT NULL,
	"units" integer NOT NULL,
	"state" text DEFAULT 'planned' NOT NULL,
	"needed_by" date,
	"priority" integer DEFAULT 5 NOT NULL,
	"created_by" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "batch_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "batch_units" CHECK ("batch"."units" between 1 and 10000),
	CONSTRAINT "batch_priority" CHECK ("batch"."priority" between 1 and 9),
	CONSTRAINT "batch_state" CHECK ("batch"."state" in ('planned', 'reserved', 'picking', 'kitted', 'finished', 'cancelled'))
);
--> statement-breakpoint
ALTER TABLE "batch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "batch_need" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"line_id" uuid NOT NULL,
	"part_id" uuid,
	"quantity" integer NOT NULL,
	CONSTRAINT "batch_need_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "batch_need_quantity" CHECK ("batch_need"."quantity" > 0)
);
--> statement-breakpoint
ALTER TABLE "batch_need" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "candidate" (
	"workshop_id" uuid NOT NULL,
	"line_id" uuid NOT NULL,
	"part_id" uuid NOT NULL,
	"rank" integer NOT NULL,
	"verdict" text NOT NULL,
	"checks" jsonb NOT NULL,
	"deviation_percent" numeric,
	"matched_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "candidate_workshop_id_line_id_part_id_pk" PRIMARY KEY("workshop_id","line_id","part_id"),
	CONSTRAINT "candidate_verdict" CHECK ("candidate"."verdict" in ('same', 'drop-in', 'with-effect', 'ask', 'refused'))
);
--> statement-breakpoint
ALTER TABLE "candidate" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "circuit" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	"rails_volts" numeric[] DEFAULT '{}' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "circuit_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "circuit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "decision" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"line_id" uuid NOT NULL,
	"part_id" uuid,
	"verdict" text NOT NULL,
	"reason" text NOT NULL,
	"spec_key" text NOT NULL,
	"decided_by" uuid NOT NULL,
	"decided_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "decision_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "decision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "line" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"sheet" text,
	"source_row" integer NOT NULL,
	"designators" text[] NOT NULL,
	"quantity" integer NOT NULL,
	"fitted" boolean NOT NULL,
	"kind" text NOT NULL,
	"text" text NOT NULL,
	"spec" jsonb NOT NULL,
	"part_number" text,
	"family" text,
	"value" numeric,
	"unit" text,
	"use" text,
	"spec_key" text NOT NULL,
	CONSTRAINT "line_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "line_quantity" CHECK ("line"."quantity" >= 0),
	CONSTRAINT "line_use" CHECK ("line"."use" is null or "line"."use" in ('timing', 'audio', 'control', 'decoupling', 'logic', 'power', 'safety'))
);
--> statement-breakpoint
ALTER TABLE "line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "question" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"line_id" uuid,
	"sheet" text,
	"source_row" integer NOT NULL,
	"code" text NOT NULL,
	"ask" text NOT NULL,
	"options" text[] NOT NULL,
	"answer" text,
	"answered_by" uuid,
	"answered_at" timestamp with time zone,
	CONSTRAINT "question_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "question" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "revision" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"circuit_id" uuid NOT NULL,
	"name" text NOT NULL,
	"upload_id" uuid,
	"state" text DEFAULT 'draft' NOT NULL,
	"reading" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_by" uuid NOT NULL,
	"frozen_at" timestamp with time zone,
	"frozen_by" uuid,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "revision_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "revision_state" CHECK ("revision"."state" in ('draft', 'frozen')),
	CONSTRAINT "revision_frozen_at" CHECK (("revision"."state" = 'frozen') = ("revision"."frozen_at" is not null))
);
--> statement-breakpoint
ALTER TABLE "revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "upload" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"circuit_id" uuid,
	"file_name" text NOT NULL,
	"store_key" text,
	"content" "bytea",
	"size_bytes" integer NOT NULL,
	"state" text DEFAULT 'received' NOT NULL,
	"problem" jsonb,
	"uploaded_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "upload_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "upload_store_key" UNIQUE("workshop_id","store_key"),
	CONSTRAINT "upload_has_bytes" CHECK (("upload"."store_key" is null) <> ("upload"."content" is null)),
	CONSTRAINT "upload_state" CHECK ("upload"."state" in ('received', 'read', 'settled', 'frozen', 'rejected'))
);
--> statement-breakpoint
ALTER TABLE "upload" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "api_token" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"token_hash" text NOT NULL,
	"scope" text DEFAULT 'write' NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	"last_used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "api_token_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "api_token_scope" CHECK ("api_token"."scope" in ('read', 'write'))
);
--> statement-breakpoint
ALTER TABLE "api_token" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "invitation" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"email" text NOT NULL,
	"roles" text[] NOT NULL,
	"token_hash" text NOT NULL,
	"invited_by" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "invitation_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "invitation_token" UNIQUE("token_hash"),
	CONSTRAINT "invitation_roles_known" CHECK ("invitation"."roles" <@ array['builder','storekeeper','buyer','lead']::text[] and cardinality("invitation"."roles") > 0)
);
--> statement-breakpoint
ALTER TABLE "invitation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "membership" (
	"workshop_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"roles" text[] NOT NULL,
	"ended_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_workshop_id_person_id_pk" PRIMARY KEY("workshop_id","person_id"),
	CONSTRAINT "membership_roles_known" CHECK ("membership"."roles" <@ array['builder','storekeeper','buyer','lead']::text[] and cardinality("membership"."roles") > 0)
);
--> statement-breakpoint
ALTER TABLE "membership" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "one_time_link" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_time_link_purpose" CHECK ("one_time_link"."purpose" in ('sign-in', 'password-reset'))
);
--> statement-breakpoint
ALTER TABLE "one_time_link" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text,
	"session_epoch" integer DEFAULT 0 NOT NULL,
	"theme" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "person_email_unique" UNIQUE("email"),
	CONSTRAINT "person_email_lower" CHECK ("person"."email" = lower("person"."email"))
);
--> statement-breakpoint
ALTER TABLE "person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "workshop" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"currency" text DEFAULT 'EUR' NOT NULL,
	"approval_limit_minor" bigint DEFAULT 25000 NOT NULL,
	"taper_convention" text DEFAULT 'ask' NOT NULL,
	"over_delivery_percent" integer DEFAULT 10 NOT NULL,
	"letterhead" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "workshop_currency_iso4217" CHECK ("workshop"."currency" ~ '^[A-Z]{3}$'),
	CONSTRAINT "workshop_limit_not_negative" CHECK ("workshop"."approval_limit_minor" >= 0),
	CONSTRAINT "workshop_taper_convention" CHECK ("workshop"."taper_convention" in ('ask', 'letters', 'old-european')),
	CONSTRAINT "workshop_over_delivery" CHECK ("workshop"."over_delivery_percent" between 0 and 100)
);
--> statement-breakpoint
ALTER TABLE "workshop" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "offer" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"supplier_id" uuid NOT NULL,
	"part_id" uuid NOT NULL,
	"supplier_code" text NOT NULL,
	"order_multiple" integer DEFAULT 1 NOT NULL,
	"minimum_quantity" integer DEFAULT 1 NOT NULL,
	"lead_time_days" integer,
	"retired_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "offer_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "offer_quantities" CHECK ("offer"."order_multiple" >= 1 and "offer"."minimum_quantity" >= 1)
);
--> statement-breakpoint
ALTER TABLE "offer" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "offer_break" (
	"workshop_id" uuid NOT NULL,
	"offer_id" uuid NOT NULL,
	"from_quantity" integer NOT NULL,
	"unit_price" numeric(18, 6) NOT NULL,
	CONSTRAINT "offer_break_workshop_id_offer_id_from_quantity_pk" PRIMARY KEY("workshop_id","offer_id","from_quantity"),
	CONSTRAINT "offer_break_from" CHECK ("offer_break"."from_quantity" >= 1),
	CONSTRAINT "offer_break_price" CHECK ("offer_break"."unit_price" > 0)
);
--> statement-breakpoint
ALTER TABLE "offer_break" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "order_line" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"order_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"part_id" uuid NOT NULL,
	"offer_id" uuid NOT NULL,
	"supplier_code" text NOT NULL,
	"description" text NOT NULL,
	"quantity" integer NOT NULL,
	"unit_price" numeric(18, 6) NOT NULL,
	"total_minor" bigint NOT NULL,
	"received" integer DEFAULT 0 NOT NULL,
	"cancelled" integer DEFAULT 0 NOT NULL,
	CONSTRAINT "order_line_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "order_line_amounts" CHECK ("order_line"."quantity" > 0 and "order_line"."received" >= 0 and "order_line"."cancelled" >= 0 and "order_line"."cancelled" <= "order_line"."quantity" and "order_line"."total_minor" >= 0)
);
--> statement-breakpoint
ALTER TABLE "order_line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "order_mail" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"order_id" uuid NOT NULL,
	"message_id" text NOT NULL,
	"to" text NOT NULL,
	"subject" text NOT NULL,
	"sent_at" timestamp with time zone,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "order_mail_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "order_mail" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "payment" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"order_id" uuid NOT NULL,
	"attempt" integer NOT NULL,
	"state" text DEFAULT 'started' NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"checkout_session_id" text,
	"payment_intent_id" text,
	"checkout_url" text,
	"last_problem" text,
	"paid_at" timestamp with time zone,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "payment_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "payment_state" CHECK ("payment"."state" in ('started', 'open', 'declined', 'paid', 'abandoned', 'failed')),
	CONSTRAINT "payment_amount" CHECK ("payment"."amount_minor" > 0)
);
--> statement-breakpoint
ALTER TABLE "payment" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "purchase_order" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"number" text NOT NULL,
	"supplier_id" uuid NOT NULL,
	"state" text DEFAULT 'draft' NOT NULL,
	"currency" text NOT NULL,
	"goods_minor" bigint DEFAULT 0 NOT NULL,
	"postage_minor" bigint DEFAULT 0 NOT NULL,
	"total_minor" bigint DEFAULT 0 NOT NULL,
	"created_by" uuid NOT NULL,
	"submitted_by" uuid,
	"approved_by" uuid,
	"sent_at" timestamp with time zone,
	"expected_on" date,
	"note" text DEFAULT '' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "purchase_order_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "purchase_order_total" CHECK ("purchase_order"."total_minor" = "purchase_order"."goods_minor" + "purchase_order"."postage_minor" and "purchase_order"."goods_minor" >= 0 and "purchase_order"."postage_minor" >= 0),
	CONSTRAINT "purchase_order_state" CHECK ("purchase_order"."state" in ('draft', 'submitted', 'approved', 'paid', 'on-account', 'sent', 'part-received', 'received', 'closed', 'cancelled'))
);
--> statement-breakpoint
ALTER TABLE "purchase_order" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "receipt" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"number" text NOT NULL,
	"order_id" uuid,
	"supplier_id" uuid,
	"delivery_note" text DEFAULT '' NOT NULL,
	"received_by" uuid NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "receipt_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "receipt" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "receipt_line" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"receipt_id" uuid NOT NULL,
	"order_line_id" uuid,
	"part_id" uuid NOT NULL,
	"bin_id" uuid NOT NULL,
	"lot_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"cautioned" boolean DEFAULT false NOT NULL,
	CONSTRAINT "receipt_line_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "receipt_line_quantity" CHECK ("receipt_line"."quantity" > 0)
);
--> statement-breakpoint
ALTER TABLE "receipt_line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "refund" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"payment_id" uuid NOT NULL,
	"amount_minor" bigint NOT NULL,
	"reason" text NOT NULL,
	"state" text DEFAULT 'asked' NOT NULL,
	"provider_id" text,
	"last_problem" text,
	"created_by" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "refund_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "refund_state" CHECK ("refund"."state" in ('asked', 'done', 'failed')),
	CONSTRAINT "refund_amount" CHECK ("refund"."amount_minor" > 0)
);
--> statement-breakpoint
ALTER TABLE "refund" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "supplier" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"address" text DEFAULT '' NOT NULL,
	"currency" text NOT NULL,
	"payment_account" text,
	"postage_minor" bigint DEFAULT 0 NOT NULL,
	"postage_free_from_minor" bigint,
	"minimum_order_minor" bigint DEFAULT 0 NOT NULL,
	"lead_time_days" integer DEFAULT 7 NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"retired_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "supplier_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "supplier_currency" CHECK ("supplier"."currency" ~ '^[A-Z]{3}$'),
	CONSTRAINT "supplier_money" CHECK ("supplier"."postage_minor" >= 0 and "supplier"."minimum_order_minor" >= 0 and ("supplier"."postage_free_from_minor" is null or "supplier"."postage_free_from_minor" >= 0)),
	CONSTRAINT "supplier_lead_time" CHECK ("supplier"."lead_time_days" between 0 and 730)
);
--> statement-breakpoint
ALTER TABLE "supplier" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit_event" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"command" text NOT NULL,
	"subject_id" text,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"request_id" text NOT NULL,
	CONSTRAINT "audit_event_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "audit_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "auth_mail" (
	"id" uuid PRIMARY KEY NOT NULL,
	"payload" jsonb NOT NULL,
	"relayed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "auth_mail" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "counter" (
	"workshop_id" uuid NOT NULL,
	"name" text NOT NULL,
	"value" integer DEFAULT 0 NOT NULL,
	CONSTRAINT "counter_workshop_id_name_pk" PRIMARY KEY("workshop_id","name")
);
--> statement-breakpoint
ALTER TABLE "counter" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "heartbeat" (
	"name" text PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "heartbeat" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "idempotency_key" (
	"workshop_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"command" text NOT NULL,
	"key" text NOT NULL,
	"body_hash" text NOT NULL,
	"state" text NOT NULL,
	"lease_until" timestamp with time zone NOT NULL,
	"answer" jsonb,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_key_workshop_id_person_id_command_key_pk" PRIMARY KEY("workshop_id","person_id","command","key"),
	CONSTRAINT "idempotency_key_state" CHECK ("idempotency_key"."state" in ('running', 'done')),
	CONSTRAINT "idempotency_key_length" CHECK (length("idempotency_key"."key") between 1 and 200)
);
--> statement-breakpoint
ALTER TABLE "idempotency_key" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "outbox" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"sequence" bigserial NOT NULL,
	"queue" text NOT NULL,
	"payload" jsonb NOT NULL,
	"run_after" timestamp with time zone DEFAULT now() NOT NULL,
	"relayed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "outbox_workshop_id_id_pk" PRIMARY KEY("workshop_id","id")
);
--> statement-breakpoint
ALTER TABLE "outbox" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "payment_event" (
	"id" text PRIMARY KEY NOT NULL,
	"type" text NOT NULL,
	"payload" jsonb NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL,
	"processed_at" timestamp with time zone,
	"outcome" text,
	"attempts" integer DEFAULT 0 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "payment_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "progress" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"what" text NOT NULL,
	"done" bigint DEFAULT 0 NOT NULL,
	"total" bigint,
	"state" text DEFAULT 'running' NOT NULL,
	"problem" jsonb,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "progress_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "progress_state" CHECK ("progress"."state" in ('running', 'done', 'failed', 'cancelled'))
);
--> statement-breakpoint
ALTER TABLE "progress" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rate_limit" (
	"key" varchar(255) PRIMARY KEY NOT NULL,
	"points" integer DEFAULT 0 NOT NULL,
	"expire" bigint
);
--> statement-breakpoint
ALTER TABLE "rate_limit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "bin" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"cabinet_id" uuid NOT NULL,
	"code" text NOT NULL,
	"column" integer NOT NULL,
	"row" integer NOT NULL,
	"capacity" integer,
	"count_due_since" timestamp with time zone,
	"count_due_reason" text,
	"retired_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "bin_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "bin_place" CHECK ("bin"."column" > 0 and "bin"."row" > 0),
	CONSTRAINT "bin_capacity" CHECK ("bin"."capacity" is null or "bin"."capacity" > 0)
);
--> statement-breakpoint
ALTER TABLE "bin" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "cabinet" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"code" text NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"room" text NOT NULL,
	"columns" integer NOT NULL,
	"rows" integer NOT NULL,
	"walk_order" integer DEFAULT 0 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "cabinet_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "cabinet_size" CHECK ("cabinet"."columns" between 1 and 60 and "cabinet"."rows" between 1 and 60)
);
--> statement-breakpoint
ALTER TABLE "cabinet" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "count_entry" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"count_id" uuid NOT NULL,
	"bin_id" uuid NOT NULL,
	"part_id" uuid NOT NULL,
	"counted" integer,
	"ledger_at_count" integer,
	"counted_by" uuid,
	"counted_at" timestamp with time zone,
	"attempt" integer DEFAULT 0 NOT NULL,
	"found" boolean DEFAULT false NOT NULL,
	"reason" text DEFAULT '' NOT NULL,
	CONSTRAINT "count_entry_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "count_entry_not_negative" CHECK ("count_entry"."counted" is null or "count_entry"."counted" >= 0),
	CONSTRAINT "count_entry_with_ledger" CHECK (("count_entry"."counted" is null) = ("count_entry"."ledger_at_count" is null))
);
--> statement-breakpoint
ALTER TABLE "count_entry" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "lot" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"part_id" uuid NOT NULL,
	"bin_id" uuid NOT NULL,
	"on_hand" integer DEFAULT 0 NOT NULL,
	"reserved" integer DEFAULT 0 NOT NULL,
	"unit_cost" numeric(18, 6) DEFAULT '0' NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL,
	"lot_code" text,
	"date_code" text,
	CONSTRAINT "lot_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "lot_reserved_within_on_hand" CHECK ("lot"."reserved" between 0 and "lot"."on_hand"),
	CONSTRAINT "lot_unit_cost" CHECK ("lot"."unit_cost" >= 0)
);
--> statement-breakpoint
ALTER TABLE "lot" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "movement" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"sequence" bigserial NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"kind" text NOT NULL,
	"lot_id" uuid NOT NULL,
	"part_id" uuid NOT NULL,
	"bin_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"balance_after" integer DEFAULT 0 NOT NULL,
	"reference_type" text NOT NULL,
	"reference_id" uuid NOT NULL,
	"reason" text DEFAULT '' NOT NULL,
	"person_id" uuid,
	"request_key" text NOT NULL,
	"request_line" integer NOT NULL,
	CONSTRAINT "movement_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "movement_kind" CHECK ("movement"."kind" in ('receipt', 'pick', 'return', 'move', 'count', 'scrap', 'opening')),
	CONSTRAINT "movement_moves" CHECK ("movement"."quantity" <> 0),
	CONSTRAINT "movement_sign" CHECK (("movement"."kind" not in ('receipt', 'return', 'opening') or "movement"."quantity" > 0) and ("movement"."kind" not in ('pick', 'scrap') or "movement"."quantity" < 0)),
	CONSTRAINT "movement_count_has_reason" CHECK ("movement"."kind" not in ('count', 'scrap') or "movement"."reason" <> '')
);
--> statement-breakpoint
ALTER TABLE "movement" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reservation" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"need_id" uuid NOT NULL,
	"lot_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"picked" integer DEFAULT 0 NOT NULL,
	"released" integer DEFAULT 0 NOT NULL,
	"open" integer GENERATED ALWAYS AS (quantity - picked - released) STORED NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reservation_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "reservation_amounts" CHECK ("reservation"."quantity" > 0 and "reservation"."picked" >= 0 and "reservation"."released" >= 0 and "reservation"."picked" + "reservation"."released" <= "reservation"."quantity")
);
--> statement-breakpoint
ALTER TABLE "reservation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "stock_count" (
	"workshop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"number" text NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"reason" text NOT NULL,
	"opened_by" uuid NOT NULL,
	"posted_by" uuid,
	"posted_at" timestamp with time zone,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "stock_count_workshop_id_id_pk" PRIMARY KEY("workshop_id","id"),
	CONSTRAINT "stock_count_state" CHECK ("stock_count"."state" in ('open', 'counted', 'recount', 'posted', 'abandoned'))
);
--> statement-breakpoint
ALTER TABLE "stock_count" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_workshop_id_revision_id_revision_workshop_id_id_fk" FOREIGN KEY ("workshop_id","revision_id") REFERENCES "public"."revision"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_need" ADD CONSTRAINT "batch_need_workshop_id_batch_id_batch_workshop_id_id_fk" FOREIGN KEY ("workshop_id","batch_id") REFERENCES "public"."batch"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_need" ADD CONSTRAINT "batch_need_workshop_id_line_id_line_workshop_id_id_fk" FOREIGN KEY ("workshop_id","line_id") REFERENCES "public"."line"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_need" ADD CONSTRAINT "batch_need_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "candidate" ADD CONSTRAINT "candidate_workshop_id_line_id_line_workshop_id_id_fk" FOREIGN KEY ("workshop_id","line_id") REFERENCES "public"."line"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "candidate" ADD CONSTRAINT "candidate_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_workshop_id_line_id_line_workshop_id_id_fk" FOREIGN KEY ("workshop_id","line_id") REFERENCES "public"."line"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "line" ADD CONSTRAINT "line_workshop_id_revision_id_revision_workshop_id_id_fk" FOREIGN KEY ("workshop_id","revision_id") REFERENCES "public"."revision"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "question" ADD CONSTRAINT "question_workshop_id_revision_id_revision_workshop_id_id_fk" FOREIGN KEY ("workshop_id","revision_id") REFERENCES "public"."revision"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_workshop_id_circuit_id_circuit_workshop_id_id_fk" FOREIGN KEY ("workshop_id","circuit_id") REFERENCES "public"."circuit"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_workshop_id_upload_id_upload_workshop_id_id_fk" FOREIGN KEY ("workshop_id","upload_id") REFERENCES "public"."upload"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_workshop_id_circuit_id_circuit_workshop_id_id_fk" FOREIGN KEY ("workshop_id","circuit_id") REFERENCES "public"."circuit"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_token" ADD CONSTRAINT "api_token_workshop_id_workshop_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshop"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_token" ADD CONSTRAINT "api_token_workshop_id_person_id_membership_workshop_id_person_id_fk" FOREIGN KEY ("workshop_id","person_id") REFERENCES "public"."membership"("workshop_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_workshop_id_workshop_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshop"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_workshop_id_invited_by_membership_workshop_id_person_id_fk" FOREIGN KEY ("workshop_id","invited_by") REFERENCES "public"."membership"("workshop_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_workshop_id_workshop_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshop"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "one_time_link" ADD CONSTRAINT "one_time_link_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_workshop_id_supplier_id_supplier_workshop_id_id_fk" FOREIGN KEY ("workshop_id","supplier_id") REFERENCES "public"."supplier"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer_break" ADD CONSTRAINT "offer_break_workshop_id_offer_id_offer_workshop_id_id_fk" FOREIGN KEY ("workshop_id","offer_id") REFERENCES "public"."offer"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_workshop_id_order_id_purchase_order_workshop_id_id_fk" FOREIGN KEY ("workshop_id","order_id") REFERENCES "public"."purchase_order"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_workshop_id_offer_id_offer_workshop_id_id_fk" FOREIGN KEY ("workshop_id","offer_id") REFERENCES "public"."offer"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_mail" ADD CONSTRAINT "order_mail_workshop_id_order_id_purchase_order_workshop_id_id_fk" FOREIGN KEY ("workshop_id","order_id") REFERENCES "public"."purchase_order"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payment" ADD CONSTRAINT "payment_workshop_id_order_id_purchase_order_workshop_id_id_fk" FOREIGN KEY ("workshop_id","order_id") REFERENCES "public"."purchase_order"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "purchase_order" ADD CONSTRAINT "purchase_order_workshop_id_supplier_id_supplier_workshop_id_id_fk" FOREIGN KEY ("workshop_id","supplier_id") REFERENCES "public"."supplier"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt" ADD CONSTRAINT "receipt_workshop_id_order_id_purchase_order_workshop_id_id_fk" FOREIGN KEY ("workshop_id","order_id") REFERENCES "public"."purchase_order"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt" ADD CONSTRAINT "receipt_workshop_id_supplier_id_supplier_workshop_id_id_fk" FOREIGN KEY ("workshop_id","supplier_id") REFERENCES "public"."supplier"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt_line" ADD CONSTRAINT "receipt_line_workshop_id_receipt_id_receipt_workshop_id_id_fk" FOREIGN KEY ("workshop_id","receipt_id") REFERENCES "public"."receipt"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt_line" ADD CONSTRAINT "receipt_line_workshop_id_order_line_id_order_line_workshop_id_id_fk" FOREIGN KEY ("workshop_id","order_line_id") REFERENCES "public"."order_line"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt_line" ADD CONSTRAINT "receipt_line_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt_line" ADD CONSTRAINT "receipt_line_workshop_id_bin_id_bin_workshop_id_id_fk" FOREIGN KEY ("workshop_id","bin_id") REFERENCES "public"."bin"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "receipt_line" ADD CONSTRAINT "receipt_line_workshop_id_lot_id_lot_workshop_id_id_fk" FOREIGN KEY ("workshop_id","lot_id") REFERENCES "public"."lot"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "refund" ADD CONSTRAINT "refund_workshop_id_payment_id_payment_workshop_id_id_fk" FOREIGN KEY ("workshop_id","payment_id") REFERENCES "public"."payment"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bin" ADD CONSTRAINT "bin_workshop_id_cabinet_id_cabinet_workshop_id_id_fk" FOREIGN KEY ("workshop_id","cabinet_id") REFERENCES "public"."cabinet"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "count_entry" ADD CONSTRAINT "count_entry_workshop_id_count_id_stock_count_workshop_id_id_fk" FOREIGN KEY ("workshop_id","count_id") REFERENCES "public"."stock_count"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "count_entry" ADD CONSTRAINT "count_entry_workshop_id_bin_id_bin_workshop_id_id_fk" FOREIGN KEY ("workshop_id","bin_id") REFERENCES "public"."bin"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "count_entry" ADD CONSTRAINT "count_entry_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "lot" ADD CONSTRAINT "lot_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "lot" ADD CONSTRAINT "lot_workshop_id_bin_id_bin_workshop_id_id_fk" FOREIGN KEY ("workshop_id","bin_id") REFERENCES "public"."bin"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movement" ADD CONSTRAINT "movement_workshop_id_lot_id_lot_workshop_id_id_fk" FOREIGN KEY ("workshop_id","lot_id") REFERENCES "public"."lot"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movement" ADD CONSTRAINT "movement_workshop_id_part_id_part_workshop_id_id_fk" FOREIGN KEY ("workshop_id","part_id") REFERENCES "public"."part"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movement" ADD CONSTRAINT "movement_workshop_id_bin_id_bin_workshop_id_id_fk" FOREIGN KEY ("workshop_id","bin_id") REFERENCES "public"."bin"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation" ADD CONSTRAINT "reservation_workshop_id_batch_id_batch_workshop_id_id_fk" FOREIGN KEY ("workshop_id","batch_id") REFERENCES "public"."batch"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation" ADD CONSTRAINT "reservation_workshop_id_need_id_batch_need_workshop_id_id_fk" FOREIGN KEY ("workshop_id","need_id") REFERENCES "public"."batch_need"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation" ADD CONSTRAINT "reservation_workshop_id_lot_id_lot_workshop_id_id_fk" FOREIGN KEY ("workshop_id","lot_id") REFERENCES "public"."lot"("workshop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "part_name_once" ON "part" USING btree ("workshop_id","name");--> statement-breakpoint
CREATE INDEX "part_by_key" ON "part" USING btree ("workshop_id","part_key");--> statement-breakpoint
CREATE INDEX "part_by_family" ON "part" USING btree ("workshop_id","family");--> statement-breakpoint
CREATE INDEX "part_by_value" ON "part" USING btree ("workshop_id","kind","value");--> statement-breakpoint
CREATE INDEX "part_search" ON "part" USING gin ((name || ' ' || coalesce(part_number, '') || ' ' || description) gin_trgm_ops);--> statement-breakpoint
CREATE UNIQUE INDEX "batch_number_once" ON "batch" USING btree ("workshop_id","number");--> statement-breakpoint
CREATE INDEX "batch_by_state" ON "batch" USING btree ("workshop_id","state");--> statement-breakpoint
CREATE UNIQUE INDEX "batch_need_once" ON "batch_need" USING btree ("workshop_id","batch_id","line_id");--> statement-breakpoint
CREATE INDEX "batch_need_by_part" ON "batch_need" USING btree ("workshop_id","part_id");--> statement-breakpoint
CREATE UNIQUE INDEX "circuit_name_once" ON "circuit" USING btree ("workshop_id","name");--> statement-breakpoint
CREATE INDEX "decision_by_line" ON "decision" USING btree ("workshop_id","line_id","decided_at");--> statement-breakpoint
CREATE INDEX "decision_by_spec" ON "decision" USING btree ("workshop_id","spec_key","decided_at");--> statement-breakpoint
CREATE UNIQUE INDEX "line_position_once" ON "line" USING btree ("workshop_id","revision_id","position");--> statement-breakpoint
CREATE INDEX "line_by_spec" ON "line" USING btree ("workshop_id","spec_key");--> statement-breakpoint
CREATE INDEX "question_by_revision" ON "question" USING btree ("workshop_id","revision_id");--> statement-breakpoint
CREATE UNIQUE INDEX "revision_name_once" ON "revision" USING btree ("workshop_id","circuit_id","name");--> statement-breakpoint
CREATE UNIQUE INDEX "api_token_hash" ON "api_token" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "membership_by_person" ON "membership" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "offer_code_once" ON "offer" USING btree ("workshop_id","supplier_id","supplier_code");--> statement-breakpoint
CREATE INDEX "offer_by_part" ON "offer" USING btree ("workshop_id","part_id");--> statement-breakpoint
CREATE UNIQUE INDEX "order_line_position_once" ON "order_line" USING btree ("workshop_id","order_id","position");--> statement-breakpoint
CREATE INDEX "order_line_by_part" ON "order_line" USING btree ("workshop_id","part_id");--> statement-breakpoint
CREATE UNIQUE INDEX "order_mail_message_once" ON "order_mail" USING btree ("workshop_id","message_id");--> statement-breakpoint
CREATE UNIQUE INDEX "payment_attempt_once" ON "payment" USING btree ("workshop_id","order_id","attempt");--> statement-breakpoint
CREATE UNIQUE INDEX "payment_session_once" ON "payment" USING btree ("workshop_id","checkout_session_id");--> statement-breakpoint
CREATE UNIQUE INDEX "purchase_order_number_once" ON "purchase_order" USING btree ("workshop_id","number");--> statement-breakpoint
CREATE INDEX "purchase_order_by_state" ON "purchase_order" USING btree ("workshop_id","state");--> statement-breakpoint
CREATE UNIQUE INDEX "receipt_number_once" ON "receipt" USING btree ("workshop_id","number");--> statement-breakpoint
CREATE INDEX "receipt_by_order" ON "receipt" USING btree ("workshop_id","order_id");--> statement-breakpoint
CREATE UNIQUE INDEX "supplier_name_once" ON "supplier" USING btree ("workshop_id","name");--> statement-breakpoint
CREATE INDEX "audit_event_by_subject" ON "audit_event" USING btree ("workshop_id","subject_id","at");--> statement-breakpoint
CREATE INDEX "idempotency_key_by_age" ON "idempotency_key" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "outbox_waiting" ON "outbox" USING btree ("sequence") WHERE relayed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "bin_code_once" ON "bin" USING btree ("workshop_id","code");--> statement-breakpoint
CREATE UNIQUE INDEX "bin_place_once" ON "bin" USING btree ("workshop_id","cabinet_id","column","row");--> statement-breakpoint
CREATE UNIQUE INDEX "cabinet_code_once" ON "cabinet" USING btree ("workshop_id","code");--> statement-breakpoint
CREATE UNIQUE INDEX "count_entry_once" ON "count_entry" USING btree ("workshop_id","count_id","bin_id","part_id");--> statement-breakpoint
CREATE INDEX "lot_by_part" ON "lot" USING btree ("workshop_id","part_id","received_at");--> statement-breakpoint
CREATE INDEX "lot_by_bin" ON "lot" USING btree ("workshop_id","bin_id");--> statement-breakpoint
CREATE UNIQUE INDEX "movement_request_once" ON "movement" USING btree ("workshop_id","request_key","request_line");--> statement-breakpoint
CREATE UNIQUE INDEX "movement_by_sequence" ON "movement" USING btree ("workshop_id","sequence");--> statement-breakpoint
CREATE INDEX "movement_by_lot" ON "movement" USING btree ("workshop_id","lot_id","sequence");--> statement-breakpoint
CREATE INDEX "movement_by_part" ON "movement" USING btree ("workshop_id","part_id","sequence");--> statement-breakpoint
CREATE INDEX "movement_by_reference" ON "movement" USING btree ("workshop_id","reference_type","reference_id");--> statement-breakpoint
CREATE INDEX "reservation_by_batch" ON "reservation" USING btree ("workshop_id","batch_id");--> statement-breakpoint
CREATE INDEX "reservation_by_need" ON "reservation" USING btree ("workshop_id","need_id");--> statement-breakpoint
CREATE INDEX "reservation_open_by_lot" ON "reservation" USING btree ("workshop_id","lot_id") WHERE quantity - picked - released > 0;--> statement-breakpoint
CREATE UNIQUE INDEX "stock_count_number_once" ON "stock_count" USING btree ("workshop_id","number");--> statement-breakpoint
CREATE POLICY "own_workshop" ON "part" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "batch" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "batch_need" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "candidate" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "circuit" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "decision" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "line" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "question" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "revision" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "upload" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop_or_scope" ON "api_token" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth') WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "own_workshop_or_scope" ON "invitation" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth') WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "own_workshop_or_scope" ON "membership" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth') WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "scope_only" ON "one_time_link" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (current_setting('app.scope', true) = 'auth') WITH CHECK (current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "member_of_workshop_or_scope" ON "person" AS PERMISSIVE FOR SELECT TO "ohmstead_app" USING (current_setting('app.scope', true) = 'auth' or exists (select 1 from membership m where m.person_id = person.id and m.workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid));--> statement-breakpoint
CREATE POLICY "auth_scope_writes" ON "person" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (current_setting('app.scope', true) = 'auth') WITH CHECK (current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "own_workshop_or_scope" ON "workshop" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'auth') WITH CHECK (id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "offer" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "offer_break" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "order_line" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "order_mail" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "payment" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "purchase_order" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "receipt" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "receipt_line" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "refund" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "supplier" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "audit_event" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "scope_only" ON "auth_mail" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (current_setting('app.scope', true) = 'auth') WITH CHECK (current_setting('app.scope', true) = 'auth');--> statement-breakpoint
CREATE POLICY "own_workshop" ON "counter" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "any_process" ON "heartbeat" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "idempotency_key" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop_or_scope" ON "outbox" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'inbox') WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid or current_setting('app.scope', true) = 'inbox');--> statement-breakpoint
CREATE POLICY "scope_only" ON "payment_event" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (current_setting('app.scope', true) = 'inbox') WITH CHECK (current_setting('app.scope', true) = 'inbox');--> statement-breakpoint
CREATE POLICY "own_workshop" ON "progress" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "any_process" ON "rate_limit" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "bin" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "cabinet" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "count_entry" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "lot" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "movement" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "reservation" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_workshop" ON "stock_count" AS PERMISSIVE FOR ALL TO "ohmstead_app" USING (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid) WITH CHECK (workshop_id = nullif(current_setting('app.workshop_id', true), '')::uuid);