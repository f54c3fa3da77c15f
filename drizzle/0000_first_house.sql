CREATE TABLE "analysis_runs" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"state" text DEFAULT 'pending' NOT NULL,
	"as_of" date,
	"requested_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"error" text,
	"summary" jsonb,
	CONSTRAINT "analysis_runs_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "analysis_runs_state" CHECK ("analysis_runs"."state" IN ('pending', 'running', 'ready', 'failed'))
);
--> statement-breakpoint
CREATE TABLE "comeback_decisions" (
	"shop_id" uuid NOT NULL,
	"return_repair_id" uuid NOT NULL,
	"status" text NOT NULL,
	"reason" text,
	"is_ours" boolean,
	"attached_to_repair_id" uuid,
	"note" text DEFAULT '' NOT NULL,
	"decided_by_user_id" uuid NOT NULL,
	"decided_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "comeback_decisions_shop_id_return_repair_id_pk" PRIMARY KEY("shop_id","return_repair_id"),
	CONSTRAINT "comeback_decisions_status" CHECK ("comeback_decisions"."status" IN ('suggested', 'confirmed', 'dismissed')),
	CONSTRAINT "comeback_decisions_reason" CHECK ("comeback_decisions"."reason" IN ('part_failed_again', 'cause_missed', 'workmanship', 'wrong_part', 'defective_part', 'work_not_completed', 'not_duplicated', 'operator_or_fuel', 'declined_work', 'unrelated', 'undetermined'))
);
--> statement-breakpoint
CREATE TABLE "comebacks" (
	"shop_id" uuid NOT NULL,
	"return_repair_id" uuid NOT NULL,
	"first_repair_id" uuid NOT NULL,
	"episode_repair_id" uuid NOT NULL,
	"days" integer NOT NULL,
	"hours" numeric(10, 2),
	"link" text NOT NULL,
	"suggested_reason" text NOT NULL,
	"evidence" text NOT NULL,
	"component_id" uuid,
	CONSTRAINT "comebacks_shop_id_return_repair_id_pk" PRIMARY KEY("shop_id","return_repair_id")
);
--> statement-breakpoint
CREATE TABLE "findings" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"model_id" uuid,
	"family_id" uuid,
	"causal_component_id" uuid NOT NULL,
	"resultant_component_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"q_value" double precision NOT NULL,
	"detail" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "findings_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "findings_pair" UNIQUE NULLS NOT DISTINCT("shop_id","model_id","family_id","causal_component_id","resultant_component_id","kind"),
	CONSTRAINT "findings_kind" CHECK ("findings"."kind" IN ('cascade', 'together'))
);
--> statement-breakpoint
CREATE TABLE "part_lives" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"model_id" uuid,
	"component_id" uuid NOT NULL,
	"part_id" uuid,
	"origin" text NOT NULL,
	"start_repair_id" uuid,
	"end_repair_id" uuid,
	"start_on" date,
	"end_on" date NOT NULL,
	"outcome" text NOT NULL,
	"entry_hours" double precision,
	"exit_hours" double precision,
	"entry_days" double precision,
	"exit_days" double precision,
	"is_dead_on_arrival" boolean DEFAULT false NOT NULL,
	"set_aside_reason" text,
	CONSTRAINT "part_lives_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "part_lives_origin" CHECK ("part_lives"."origin" IN ('fitted', 'in_service', 'assumed_original')),
	CONSTRAINT "part_lives_outcome" CHECK ("part_lives"."outcome" IN ('failed', 'damage', 'censored', 'unknown'))
);
--> statement-breakpoint
CREATE TABLE "column_mappings" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"header_key" text NOT NULL,
	"mapping" jsonb NOT NULL,
	"confirmed_by_user_id" uuid NOT NULL,
	"confirmed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "column_mappings_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "column_mappings_header" UNIQUE("shop_id","kind","header_key")
);
--> statement-breakpoint
CREATE TABLE "idempotency_keys" (
	"shop_id" uuid NOT NULL,
	"key" text NOT NULL,
	"fingerprint" text NOT NULL,
	"answer" jsonb,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_keys_shop_id_key_pk" PRIMARY KEY("shop_id","key")
);
--> statement-breakpoint
CREATE TABLE "import_changes" (
	"shop_id" uuid NOT NULL,
	"import_id" uuid NOT NULL,
	"table_name" text NOT NULL,
	"row_id" uuid NOT NULL,
	"before" jsonb,
	CONSTRAINT "import_changes_shop_id_import_id_table_name_row_id_pk" PRIMARY KEY("shop_id","import_id","table_name","row_id")
);
--> statement-breakpoint
CREATE TABLE "import_rejections" (
	"shop_id" uuid NOT NULL,
	"import_id" uuid NOT NULL,
	"ordinal" bigserial NOT NULL,
	"line" integer NOT NULL,
	"repair_number" text,
	"cells" jsonb NOT NULL,
	"errors" jsonb NOT NULL,
	CONSTRAINT "import_rejections_shop_id_import_id_ordinal_pk" PRIMARY KEY("shop_id","import_id","ordinal")
);
--> statement-breakpoint
CREATE TABLE "imports" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"source" text NOT NULL,
	"file_name" text,
	"spool_path" text,
	"mapping" jsonb,
	"is_dry_run" boolean DEFAULT false NOT NULL,
	"status" text DEFAULT 'queued' NOT NULL,
	"analysis_run_id" uuid,
	"rows_read" integer DEFAULT 0 NOT NULL,
	"rows_total" integer,
	"created_count" integer DEFAULT 0 NOT NULL,
	"updated_count" integer DEFAULT 0 NOT NULL,
	"unchanged_count" integer DEFAULT 0 NOT NULL,
	"rejected_count" integer DEFAULT 0 NOT NULL,
	"remarks" jsonb,
	"error" text,
	"started_by_user_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	CONSTRAINT "imports_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "imports_kind" CHECK ("imports"."kind" IN ('repairs', 'units', 'parts')),
	CONSTRAINT "imports_source" CHECK ("imports"."source" IN ('file', 'batch', 'shell')),
	CONSTRAINT "imports_status" CHECK ("imports"."status" IN ('queued', 'running', 'done', 'failed', 'undone'))
);
--> statement-breakpoint
CREATE TABLE "customers" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"ref" text NOT NULL,
	"ref_key" text NOT NULL,
	"name" text,
	"phone" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "customers_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "customers_ref" UNIQUE("shop_id","ref_key")
);
--> statement-breakpoint
CREATE TABLE "families" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "families_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "families_name" UNIQUE("shop_id","name_key")
);
--> statement-breakpoint
CREATE TABLE "family_models" (
	"shop_id" uuid NOT NULL,
	"family_id" uuid NOT NULL,
	"model_id" uuid NOT NULL,
	CONSTRAINT "family_models_shop_id_family_id_model_id_pk" PRIMARY KEY("shop_id","family_id","model_id")
);
--> statement-breakpoint
CREATE TABLE "models" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"maker" text NOT NULL,
	"maker_key" text NOT NULL,
	"model" text NOT NULL,
	"model_key" text NOT NULL,
	"product_type" text,
	"changed_by_import_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "models_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "models_name" UNIQUE("shop_id","maker_key","model_key"),
	CONSTRAINT "models_product_type" CHECK ("models"."product_type" IN ('lawn_tractor', 'zero_turn', 'walk_behind', 'handheld', 'snow', 'utility', 'other'))
);
--> statement-breakpoint
CREATE TABLE "unit_engines" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"maker" text,
	"model" text,
	"serial" text,
	"engine_key" text NOT NULL,
	"seen_from_on" date,
	CONSTRAINT "unit_engines_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "unit_engines_engine" UNIQUE("shop_id","unit_id","engine_key")
);
--> statement-breakpoint
CREATE TABLE "units" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"identity" text NOT NULL,
	"serial" text,
	"serial_key" text,
	"maker_key" text DEFAULT '' NOT NULL,
	"unit_ref" text,
	"unit_ref_key" text,
	"model_id" uuid,
	"customer_id" uuid,
	"in_service_on" date,
	"use_class" text,
	"known_from_on" date,
	"is_registered" boolean DEFAULT false NOT NULL,
	"register_meter_hours" numeric(10, 2),
	"register_read_on" date,
	"changed_by_import_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "units_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "units_serial" UNIQUE("shop_id","serial_key","maker_key"),
	CONSTRAINT "units_identity" CHECK ("units"."identity" IN ('serial', 'tag', 'customer_model')),
	CONSTRAINT "units_use_class" CHECK ("units"."use_class" IN ('homeowner', 'commercial', 'rental', 'municipal')),
	CONSTRAINT "units_named" CHECK (("units"."identity" <> 'serial' OR "units"."serial_key" IS NOT NULL) AND ("units"."identity" <> 'tag' OR "units"."unit_ref_key" IS NOT NULL))
);
--> statement-breakpoint
CREATE TABLE "components" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	"system" text DEFAULT 'unassigned' NOT NULL,
	"kind" text DEFAULT 'unset' NOT NULL,
	"changed_by_import_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "components_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "components_name" UNIQUE("shop_id","name_key"),
	CONSTRAINT "components_kind" CHECK ("components"."kind" IN ('unset', 'service_item', 'only_when_bad', 'depends'))
);
--> statement-breakpoint
CREATE TABLE "dictionary_entries" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"matches" text NOT NULL,
	"text" text NOT NULL,
	"text_key" text NOT NULL,
	"component_id" uuid,
	"reason" text,
	"confirmed_by_user_id" uuid NOT NULL,
	"confirmed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "dictionary_entries_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "dictionary_entries_text" UNIQUE("shop_id","matches","text_key"),
	CONSTRAINT "dictionary_entries_matches" CHECK ("dictionary_entries"."matches" IN ('part_number', 'description', 'phrase')),
	CONSTRAINT "dictionary_entries_reason" CHECK ("dictionary_entries"."reason" IN ('failed', 'maintenance', 'preventive', 'damage', 'upgrade'))
);
--> statement-breakpoint
CREATE TABLE "parts" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"maker" text NOT NULL,
	"maker_key" text NOT NULL,
	"number" text NOT NULL,
	"number_key" text NOT NULL,
	"description" text,
	"supplier" text,
	"component_id" uuid,
	"superseded_by_part_id" uuid,
	"fitment_note" text,
	"list_price_cents" integer,
	"warranty_days" integer,
	"changed_by_import_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "parts_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "parts_number" UNIQUE("shop_id","maker_key","number_key"),
	CONSTRAINT "parts_superseded_by_other" CHECK ("parts"."superseded_by_part_id" <> "parts"."id"),
	CONSTRAINT "parts_warranty_days" CHECK ("parts"."warranty_days" >= 0)
);
--> statement-breakpoint
CREATE TABLE "api_keys" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"key_hash" text NOT NULL,
	"key_hint" text NOT NULL,
	"may_import" boolean NOT NULL,
	"may_read" boolean NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "api_keys_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "api_keys_key_hash_unique" UNIQUE("key_hash"),
	CONSTRAINT "api_keys_scope" CHECK ("api_keys"."may_import" OR "api_keys"."may_read")
);
--> statement-breakpoint
CREATE TABLE "memberships" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"disabled_at" timestamp with time zone,
	CONSTRAINT "memberships_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "memberships_user" UNIQUE("shop_id","user_id"),
	CONSTRAINT "memberships_role" CHECK ("memberships"."role" IN ('owner', 'service_manager', 'technician', 'counter', 'accountant'))
);
--> statement-breakpoint
CREATE TABLE "password_tokens" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"token_hash" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	CONSTRAINT "password_tokens_token_hash_unique" UNIQUE("token_hash"),
	CONSTRAINT "password_tokens_purpose" CHECK ("password_tokens"."purpose" IN ('invite', 'reset'))
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"shop_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	"user_agent" text DEFAULT '' NOT NULL
);
--> statement-breakpoint
CREATE TABLE "technician_names" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"spelling" text NOT NULL,
	"spelling_key" text NOT NULL,
	"technician_id" uuid NOT NULL,
	"confirmed_by_user_id" uuid,
	CONSTRAINT "technician_names_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "technician_names_spelling" UNIQUE("shop_id","spelling_key")
);
--> statement-breakpoint
CREATE TABLE "technicians" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"display_name" text NOT NULL,
	"user_id" uuid,
	"left_on" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "technicians_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "technicians_user" UNIQUE("shop_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"display_name" text NOT NULL,
	"password_hash" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "users_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "audit_log" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"user_id" uuid,
	"api_key_id" uuid,
	"action" text NOT NULL,
	"subject" text NOT NULL,
	"subject_id" text,
	"detail" jsonb,
	CONSTRAINT "audit_log_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "mails" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"purpose" text NOT NULL,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"text_body" text NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"message_id" text,
	"error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone,
	CONSTRAINT "mails_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "mails_state" CHECK ("mails"."state" IN ('queued', 'sending', 'sent', 'failed', 'unknown'))
);
--> statement-breakpoint
CREATE TABLE "readings" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"repair_id" uuid,
	"component_id" uuid,
	"quantity" text NOT NULL,
	"value" numeric(12, 4) NOT NULL,
	"unit_code" text NOT NULL,
	"lower_limit" numeric(12, 4),
	"upper_limit" numeric(12, 4),
	"limit_source" text,
	"temperature_state" text,
	"instrument" text,
	"taken_at" timestamp with time zone NOT NULL,
	"taken_by_user_id" uuid NOT NULL,
	CONSTRAINT "readings_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "readings_quantity" CHECK ("readings"."quantity" IN ('air_gap', 'coil_resistance', 'voltage_in', 'voltage_out', 'voltage_at_part', 'current')),
	CONSTRAINT "readings_temperature_state" CHECK ("readings"."temperature_state" IN ('cold', 'hot'))
);
--> statement-breakpoint
CREATE TABLE "repair_lines" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"repair_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"kind" text NOT NULL,
	"part_id" uuid,
	"part_number_text" text,
	"description" text,
	"supplier" text,
	"component_id" uuid,
	"component_origin" text DEFAULT 'unknown' NOT NULL,
	"reason" text DEFAULT 'unknown' NOT NULL,
	"reason_origin" text DEFAULT 'unknown' NOT NULL,
	"work_done" text,
	"quantity" numeric(12, 3),
	"amount_cents" integer,
	"cost_cents" integer,
	"labor_op" text,
	"labor_hours" numeric(8, 2),
	"labor_amount_cents" integer,
	"technician_text" text,
	"pay_type" text,
	CONSTRAINT "repair_lines_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "repair_lines_kind" CHECK ("repair_lines"."kind" IN ('part', 'labor', 'work', 'fee', 'note')),
	CONSTRAINT "repair_lines_component_origin" CHECK ("repair_lines"."component_origin" IN ('file', 'catalogue', 'dictionary', 'rule', 'person', 'unknown')),
	CONSTRAINT "repair_lines_reason_origin" CHECK ("repair_lines"."reason_origin" IN ('file', 'dictionary', 'rule', 'person', 'unknown')),
	CONSTRAINT "repair_lines_reason" CHECK ("repair_lines"."reason" IN ('failed', 'maintenance', 'preventive', 'damage', 'upgrade', 'unknown')),
	CONSTRAINT "repair_lines_work_done" CHECK ("repair_lines"."work_done" IN ('adjusted', 'cleaned', 'repaired', 'tightened', 'tested_good', 'nothing_found')),
	CONSTRAINT "repair_lines_pay_type" CHECK ("repair_lines"."pay_type" IN ('customer', 'warranty', 'shop'))
);
--> statement-breakpoint
CREATE TABLE "repair_technicians" (
	"shop_id" uuid NOT NULL,
	"repair_id" uuid NOT NULL,
	"technician_id" uuid NOT NULL,
	CONSTRAINT "repair_technicians_shop_id_repair_id_technician_id_pk" PRIMARY KEY("shop_id","repair_id","technician_id")
);
--> statement-breakpoint
CREATE TABLE "repair_versions" (
	"shop_id" uuid NOT NULL,
	"repair_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"replaced_by_import_id" uuid,
	"replaced_at" timestamp with time zone DEFAULT now() NOT NULL,
	"repair" jsonb NOT NULL,
	"lines" jsonb NOT NULL,
	CONSTRAINT "repair_versions_shop_id_repair_id_version_pk" PRIMARY KEY("shop_id","repair_id","version")
);
--> statement-breakpoint
CREATE TABLE "repairs" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"location_id" uuid,
	"number" text NOT NULL,
	"number_key" text NOT NULL,
	"ticket_type" text DEFAULT 'repair' NOT NULL,
	"opened_on" date,
	"ready_on" date,
	"closed_on" date NOT NULL,
	"picked_up_on" date,
	"work_on" date GENERATED ALWAYS AS (COALESCE(ready_on, closed_on)) STORED NOT NULL,
	"unit_id" uuid,
	"model_id" uuid,
	"customer_id" uuid,
	"serial_text" text,
	"unit_ref_text" text,
	"engine_maker" text,
	"engine_model" text,
	"engine_serial" text,
	"meter_hours" numeric(10, 2),
	"meter_fault" text,
	"complaint" text,
	"cause" text,
	"correction" text,
	"notes" text,
	"technician_text" text,
	"pay_type" text,
	"labor_op" text,
	"labor_hours" numeric(8, 2),
	"labor_amount_cents" integer,
	"version" integer DEFAULT 1 NOT NULL,
	"changed_by_import_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "repairs_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "repairs_number" UNIQUE NULLS NOT DISTINCT("shop_id","location_id","number_key"),
	CONSTRAINT "repairs_ticket_type" CHECK ("repairs"."ticket_type" IN ('repair', 'setup', 'counter_sale', 'internal')),
	CONSTRAINT "repairs_pay_type" CHECK ("repairs"."pay_type" IN ('customer', 'warranty', 'shop')),
	CONSTRAINT "repairs_meter_hours" CHECK ("repairs"."meter_hours" >= 0)
);
--> statement-breakpoint
CREATE TABLE "locations" (
	"shop_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	CONSTRAINT "locations_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "locations_name" UNIQUE("shop_id","name_key")
);
--> statement-breakpoint
CREATE TABLE "shops" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"time_zone" text DEFAULT 'America/New_York' NOT NULL,
	"locale" text DEFAULT 'en-US' NOT NULL,
	"currency" text DEFAULT 'USD' NOT NULL,
	"length_unit" text DEFAULT 'in' NOT NULL,
	"temperature_unit" text DEFAULT 'degF' NOT NULL,
	"window_days" integer DEFAULT 90 NOT NULL,
	"window_hours" numeric(10, 2),
	"door_rate_cents" integer DEFAULT 9500 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "shops_name_unique" UNIQUE("name"),
	CONSTRAINT "shops_window_days" CHECK ("shops"."window_days" BETWEEN 1 AND 730),
	CONSTRAINT "shops_window_hours" CHECK ("shops"."window_hours" > 0),
	CONSTRAINT "shops_door_rate" CHECK ("shops"."door_rate_cents" >= 0),
	CONSTRAINT "shops_length_unit" CHECK ("shops"."length_unit" IN ('in', 'mm')),
	CONSTRAINT "shops_temperature_unit" CHECK ("shops"."temperature_unit" IN ('degF', 'Cel'))
);
--> statement-breakpoint
ALTER TABLE "analysis_runs" ADD CONSTRAINT "analysis_runs_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comeback_decisions" ADD CONSTRAINT "comeback_decisions_return_fk" FOREIGN KEY ("shop_id","return_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comeback_decisions" ADD CONSTRAINT "comeback_decisions_attached_fk" FOREIGN KEY ("shop_id","attached_to_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comeback_decisions" ADD CONSTRAINT "comeback_decisions_decided_by_user_id_users_id_fk" FOREIGN KEY ("decided_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comebacks" ADD CONSTRAINT "comebacks_return_fk" FOREIGN KEY ("shop_id","return_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comebacks" ADD CONSTRAINT "comebacks_first_fk" FOREIGN KEY ("shop_id","first_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comebacks" ADD CONSTRAINT "comebacks_episode_fk" FOREIGN KEY ("shop_id","episode_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comebacks" ADD CONSTRAINT "comebacks_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_model_fk" FOREIGN KEY ("shop_id","model_id") REFERENCES "public"."models"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_family_fk" FOREIGN KEY ("shop_id","family_id") REFERENCES "public"."families"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_causal_fk" FOREIGN KEY ("shop_id","causal_component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "findings" ADD CONSTRAINT "findings_resultant_fk" FOREIGN KEY ("shop_id","resultant_component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_unit_fk" FOREIGN KEY ("shop_id","unit_id") REFERENCES "public"."units"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_model_fk" FOREIGN KEY ("shop_id","model_id") REFERENCES "public"."models"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_part_fk" FOREIGN KEY ("shop_id","part_id") REFERENCES "public"."parts"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_start_repair_fk" FOREIGN KEY ("shop_id","start_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_lives" ADD CONSTRAINT "part_lives_end_repair_fk" FOREIGN KEY ("shop_id","end_repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "column_mappings" ADD CONSTRAINT "column_mappings_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "column_mappings" ADD CONSTRAINT "column_mappings_confirmed_by_user_id_users_id_fk" FOREIGN KEY ("confirmed_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "idempotency_keys" ADD CONSTRAINT "idempotency_keys_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_changes" ADD CONSTRAINT "import_changes_import_fk" FOREIGN KEY ("shop_id","import_id") REFERENCES "public"."imports"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_rejections" ADD CONSTRAINT "import_rejections_import_fk" FOREIGN KEY ("shop_id","import_id") REFERENCES "public"."imports"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "imports" ADD CONSTRAINT "imports_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "imports" ADD CONSTRAINT "imports_analysis_run_fk" FOREIGN KEY ("shop_id","analysis_run_id") REFERENCES "public"."analysis_runs"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "imports" ADD CONSTRAINT "imports_started_by_user_id_users_id_fk" FOREIGN KEY ("started_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customers" ADD CONSTRAINT "customers_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "families" ADD CONSTRAINT "families_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "family_models" ADD CONSTRAINT "family_models_family_fk" FOREIGN KEY ("shop_id","family_id") REFERENCES "public"."families"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "family_models" ADD CONSTRAINT "family_models_model_fk" FOREIGN KEY ("shop_id","model_id") REFERENCES "public"."models"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "models" ADD CONSTRAINT "models_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "unit_engines" ADD CONSTRAINT "unit_engines_unit_fk" FOREIGN KEY ("shop_id","unit_id") REFERENCES "public"."units"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "units" ADD CONSTRAINT "units_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "units" ADD CONSTRAINT "units_model_fk" FOREIGN KEY ("shop_id","model_id") REFERENCES "public"."models"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "units" ADD CONSTRAINT "units_customer_fk" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customers"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "components" ADD CONSTRAINT "components_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "dictionary_entries" ADD CONSTRAINT "dictionary_entries_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "dictionary_entries" ADD CONSTRAINT "dictionary_entries_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "dictionary_entries" ADD CONSTRAINT "dictionary_entries_confirmed_by_user_id_users_id_fk" FOREIGN KEY ("confirmed_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "parts" ADD CONSTRAINT "parts_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "parts" ADD CONSTRAINT "parts_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "parts" ADD CONSTRAINT "parts_superseded_by_fk" FOREIGN KEY ("shop_id","superseded_by_part_id") REFERENCES "public"."parts"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_keys" ADD CONSTRAINT "api_keys_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "password_tokens" ADD CONSTRAINT "password_tokens_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "technician_names" ADD CONSTRAINT "technician_names_technician_fk" FOREIGN KEY ("shop_id","technician_id") REFERENCES "public"."technicians"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "technician_names" ADD CONSTRAINT "technician_names_confirmed_by_user_id_users_id_fk" FOREIGN KEY ("confirmed_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "technicians" ADD CONSTRAINT "technicians_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "technicians" ADD CONSTRAINT "technicians_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_log" ADD CONSTRAINT "audit_log_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_log" ADD CONSTRAINT "audit_log_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_log" ADD CONSTRAINT "audit_log_key_fk" FOREIGN KEY ("shop_id","api_key_id") REFERENCES "public"."api_keys"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "readings" ADD CONSTRAINT "readings_unit_fk" FOREIGN KEY ("shop_id","unit_id") REFERENCES "public"."units"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "readings" ADD CONSTRAINT "readings_repair_fk" FOREIGN KEY ("shop_id","repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "readings" ADD CONSTRAINT "readings_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "readings" ADD CONSTRAINT "readings_taken_by_user_id_users_id_fk" FOREIGN KEY ("taken_by_user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD CONSTRAINT "repair_lines_repair_fk" FOREIGN KEY ("shop_id","repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD CONSTRAINT "repair_lines_part_fk" FOREIGN KEY ("shop_id","part_id") REFERENCES "public"."parts"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD CONSTRAINT "repair_lines_component_fk" FOREIGN KEY ("shop_id","component_id") REFERENCES "public"."components"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_technicians" ADD CONSTRAINT "repair_technicians_repair_fk" FOREIGN KEY ("shop_id","repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_technicians" ADD CONSTRAINT "repair_technicians_technician_fk" FOREIGN KEY ("shop_id","technician_id") REFERENCES "public"."technicians"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_versions" ADD CONSTRAINT "repair_versions_repair_fk" FOREIGN KEY ("shop_id","repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repairs" ADD CONSTRAINT "repairs_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repairs" ADD CONSTRAINT "repairs_location_fk" FOREIGN KEY ("shop_id","location_id") REFERENCES "public"."locations"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repairs" ADD CONSTRAINT "repairs_unit_fk" FOREIGN KEY ("shop_id","unit_id") REFERENCES "public"."units"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repairs" ADD CONSTRAINT "repairs_model_fk" FOREIGN KEY ("shop_id","model_id") REFERENCES "public"."models"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repairs" ADD CONSTRAINT "repairs_customer_fk" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customers"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "locations" ADD CONSTRAINT "locations_shop_id_shops_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "analysis_runs_requested" ON "analysis_runs" USING btree ("shop_id","requested_at");--> statement-breakpoint
CREATE INDEX "comeback_decisions_attached" ON "comeback_decisions" USING btree ("shop_id","attached_to_repair_id");--> statement-breakpoint
CREATE INDEX "comeback_decisions_decided_by" ON "comeback_decisions" USING btree ("decided_by_user_id");--> statement-breakpoint
CREATE INDEX "comebacks_first" ON "comebacks" USING btree ("shop_id","first_repair_id");--> statement-breakpoint
CREATE INDEX "comebacks_episode" ON "comebacks" USING btree ("shop_id","episode_repair_id");--> statement-breakpoint
CREATE INDEX "comebacks_component" ON "comebacks" USING btree ("shop_id","component_id");--> statement-breakpoint
CREATE INDEX "findings_model" ON "findings" USING btree ("shop_id","model_id");--> statement-breakpoint
CREATE INDEX "findings_family" ON "findings" USING btree ("shop_id","family_id");--> statement-breakpoint
CREATE INDEX "findings_causal" ON "findings" USING btree ("shop_id","causal_component_id");--> statement-breakpoint
CREATE INDEX "findings_resultant" ON "findings" USING btree ("shop_id","resultant_component_id");--> statement-breakpoint
CREATE INDEX "part_lives_component" ON "part_lives" USING btree ("shop_id","component_id","model_id");--> statement-breakpoint
CREATE INDEX "part_lives_unit" ON "part_lives" USING btree ("shop_id","unit_id");--> statement-breakpoint
CREATE INDEX "part_lives_model" ON "part_lives" USING btree ("shop_id","model_id");--> statement-breakpoint
CREATE INDEX "part_lives_part" ON "part_lives" USING btree ("shop_id","part_id");--> statement-breakpoint
CREATE INDEX "part_lives_start_repair" ON "part_lives" USING btree ("shop_id","start_repair_id");--> statement-breakpoint
CREATE INDEX "part_lives_end_repair" ON "part_lives" USING btree ("shop_id","end_repair_id");--> statement-breakpoint
CREATE INDEX "column_mappings_confirmed_by" ON "column_mappings" USING btree ("confirmed_by_user_id");--> statement-breakpoint
CREATE INDEX "import_changes_row" ON "import_changes" USING btree ("shop_id","row_id");--> statement-breakpoint
CREATE INDEX "imports_created" ON "imports" USING btree ("shop_id","created_at","id");--> statement-breakpoint
CREATE INDEX "imports_analysis_run" ON "imports" USING btree ("shop_id","analysis_run_id");--> statement-breakpoint
CREATE INDEX "imports_started_by" ON "imports" USING btree ("started_by_user_id");--> statement-breakpoint
CREATE INDEX "family_models_model" ON "family_models" USING btree ("shop_id","model_id");--> statement-breakpoint
CREATE INDEX "units_ref" ON "units" USING btree ("shop_id","unit_ref_key");--> statement-breakpoint
CREATE INDEX "units_model" ON "units" USING btree ("shop_id","model_id");--> statement-breakpoint
CREATE INDEX "units_customer" ON "units" USING btree ("shop_id","customer_id");--> statement-breakpoint
CREATE INDEX "dictionary_entries_component" ON "dictionary_entries" USING btree ("shop_id","component_id");--> statement-breakpoint
CREATE INDEX "dictionary_entries_confirmed_by" ON "dictionary_entries" USING btree ("confirmed_by_user_id");--> statement-breakpoint
CREATE INDEX "parts_by_number" ON "parts" USING btree ("shop_id","number_key");--> statement-breakpoint
CREATE INDEX "parts_component" ON "parts" USING btree ("shop_id","component_id");--> statement-breakpoint
CREATE INDEX "parts_superseded_by" ON "parts" USING btree ("shop_id","superseded_by_part_id");--> statement-breakpoint
CREATE INDEX "memberships_by_user" ON "memberships" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "password_tokens_user" ON "password_tokens" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_user" ON "sessions" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_shop" ON "sessions" USING btree ("shop_id");--> statement-breakpoint
CREATE INDEX "technician_names_technician" ON "technician_names" USING btree ("shop_id","technician_id");--> statement-breakpoint
CREATE INDEX "technician_names_confirmed_by" ON "technician_names" USING btree ("confirmed_by_user_id");--> statement-breakpoint
CREATE INDEX "technicians_by_user" ON "technicians" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "audit_log_at" ON "audit_log" USING btree ("shop_id","created_at","id");--> statement-breakpoint
CREATE INDEX "audit_log_user" ON "audit_log" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "audit_log_key" ON "audit_log" USING btree ("shop_id","api_key_id");--> statement-breakpoint
CREATE INDEX "mails_created" ON "mails" USING btree ("shop_id","created_at","id");--> statement-breakpoint
CREATE INDEX "readings_unit" ON "readings" USING btree ("shop_id","unit_id");--> statement-breakpoint
CREATE INDEX "readings_repair" ON "readings" USING btree ("shop_id","repair_id");--> statement-breakpoint
CREATE INDEX "readings_component" ON "readings" USING btree ("shop_id","component_id");--> statement-breakpoint
CREATE INDEX "readings_taken_by" ON "readings" USING btree ("taken_by_user_id");--> statement-breakpoint
CREATE INDEX "repair_lines_repair" ON "repair_lines" USING btree ("shop_id","repair_id","position");--> statement-breakpoint
CREATE INDEX "repair_lines_component" ON "repair_lines" USING btree ("shop_id","component_id");--> statement-breakpoint
CREATE INDEX "repair_lines_part" ON "repair_lines" USING btree ("shop_id","part_id");--> statement-breakpoint
CREATE INDEX "repair_technicians_technician" ON "repair_technicians" USING btree ("shop_id","technician_id");--> statement-breakpoint
CREATE INDEX "repairs_work_on" ON "repairs" USING btree ("shop_id","work_on","id");--> statement-breakpoint
CREATE INDEX "repairs_unit" ON "repairs" USING btree ("shop_id","unit_id","work_on");--> statement-breakpoint
CREATE INDEX "repairs_model" ON "repairs" USING btree ("shop_id","model_id","work_on");--> statement-breakpoint
CREATE INDEX "repairs_customer" ON "repairs" USING btree ("shop_id","customer_id");