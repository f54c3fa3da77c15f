ALTER TABLE "imports" ADD COLUMN "layout" jsonb;--> statement-breakpoint
ALTER TABLE "customers" ADD COLUMN "changed_by_import_id" uuid;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD COLUMN "part_maker_text" text;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD COLUMN "component_text" text;--> statement-breakpoint
ALTER TABLE "repair_lines" ADD COLUMN "stated_reason" text;