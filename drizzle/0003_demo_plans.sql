CREATE TABLE "demo_plans" (
	"revision_id" uuid PRIMARY KEY NOT NULL,
	"plan" jsonb NOT NULL,
	"placed" boolean DEFAULT false NOT NULL,
	"done" boolean DEFAULT false NOT NULL
);
--> statement-breakpoint
ALTER TABLE "demo_plans" ADD CONSTRAINT "demo_plans_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE cascade ON UPDATE no action;