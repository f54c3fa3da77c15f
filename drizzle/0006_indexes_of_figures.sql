DROP INDEX "repairs_model";--> statement-breakpoint
CREATE INDEX "repair_facts_judged" ON "repair_facts" USING btree ("shop_id","repair_id") WHERE "repair_facts"."left_out" IS NULL;--> statement-breakpoint
CREATE INDEX "repair_lines_failed" ON "repair_lines" USING btree ("shop_id","repair_id","component_id") WHERE "repair_lines"."kind" = 'part' AND "repair_lines"."reason" = 'failed';--> statement-breakpoint
CREATE INDEX "repair_lines_unknown" ON "repair_lines" USING btree ("shop_id","component_id") WHERE "repair_lines"."kind" = 'part' AND "repair_lines"."reason" = 'unknown';--> statement-breakpoint
CREATE INDEX "repairs_model" ON "repairs" USING btree ("shop_id","model_id","work_on","id","unit_id");