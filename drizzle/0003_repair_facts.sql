CREATE TABLE "repair_facts" (
	"shop_id" uuid NOT NULL,
	"repair_id" uuid NOT NULL,
	"left_out" text,
	"trouble_component_ids" uuid[] NOT NULL,
	"systems" text[] NOT NULL,
	CONSTRAINT "repair_facts_shop_id_repair_id_pk" PRIMARY KEY("shop_id","repair_id"),
	CONSTRAINT "repair_facts_left_out" CHECK ("repair_facts"."left_out" IN ('not_a_repair', 'unidentified', 'maintenance_only'))
);
--> statement-breakpoint
ALTER TABLE "repair_facts" ADD CONSTRAINT "repair_facts_repair_fk" FOREIGN KEY ("shop_id","repair_id") REFERENCES "public"."repairs"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "repair_facts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "repair_facts" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE POLICY "one_shop" ON "repair_facts" USING (shop_id = current_shop_id()) WITH CHECK (shop_id = current_shop_id());
