CREATE TABLE "budget_cases" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"question" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "one_case_per_name" UNIQUE("person_id","name"),
	CONSTRAINT "case_has_a_name" CHECK (length("budget_cases"."name") between 1 and 80),
	CONSTRAINT "case_has_a_question" CHECK (length("budget_cases"."question") between 1 and 2000)
);
--> statement-breakpoint
ALTER TABLE "budget_cases" ADD CONSTRAINT "budget_cases_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;