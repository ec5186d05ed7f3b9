CREATE TYPE "public"."role" AS ENUM('engineer', 'lead', 'archivist');--> statement-breakpoint
CREATE TABLE "installation" (
	"single" boolean PRIMARY KEY DEFAULT true NOT NULL,
	"demo_at" timestamp with time zone,
	CONSTRAINT "installation_single" CHECK ("installation"."single")
);
--> statement-breakpoint
ALTER TABLE "installation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "membership" (
	"team_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" "role" NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_team_id_person_id_pk" PRIMARY KEY("team_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "membership" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "person_email_unique" UNIQUE("email"),
	CONSTRAINT "person_email_lower" CHECK ("person"."email" = lower("person"."email"))
);
--> statement-breakpoint
ALTER TABLE "person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "team" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "team_slug_unique" UNIQUE("slug"),
	CONSTRAINT "team_slug_shape" CHECK ("team"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$')
);
--> statement-breakpoint
ALTER TABLE "team" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "worksheet" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" uuid NOT NULL,
	"number" text NOT NULL,
	"title" text NOT NULL,
	"text" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "worksheet_team_number" UNIQUE("team_id","number"),
	CONSTRAINT "worksheet_version_positive" CHECK ("worksheet"."version" > 0)
);
--> statement-breakpoint
ALTER TABLE "worksheet" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_team_id_team_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."team"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "worksheet" ADD CONSTRAINT "worksheet_team_id_team_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."team"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "worksheet" ADD CONSTRAINT "worksheet_created_by_person_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE POLICY "for_all_teams" ON "installation" AS PERMISSIVE FOR SELECT TO "herringbone_app" USING (true);--> statement-breakpoint
CREATE POLICY "noted_by_application" ON "installation" AS PERMISSIVE FOR UPDATE TO "herringbone_app" USING (true);--> statement-breakpoint
CREATE POLICY "of_current_team" ON "membership" AS PERMISSIVE FOR ALL TO "herringbone_app" USING ("team_id" = nullif(current_setting('app.team_id', true), '')::uuid) WITH CHECK ("team_id" = nullif(current_setting('app.team_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "member_read" ON "person" AS PERMISSIVE FOR SELECT TO "herringbone_app" USING (exists (select 1 from membership where membership.person_id = person.id));--> statement-breakpoint
CREATE POLICY "member_change" ON "person" AS PERMISSIVE FOR UPDATE TO "herringbone_app" USING (exists (select 1 from membership where membership.person_id = person.id)) WITH CHECK (exists (select 1 from membership where membership.person_id = person.id));--> statement-breakpoint
CREATE POLICY "anybody_joins" ON "person" AS PERMISSIVE FOR INSERT TO "herringbone_app" WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "of_current_team" ON "team" AS PERMISSIVE FOR ALL TO "herringbone_app" USING ("id" = nullif(current_setting('app.team_id', true), '')::uuid) WITH CHECK ("id" = nullif(current_setting('app.team_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "of_current_team" ON "worksheet" AS PERMISSIVE FOR ALL TO "herringbone_app" USING ("team_id" = nullif(current_setting('app.team_id', true), '')::uuid) WITH CHECK ("team_id" = nullif(current_setting('app.team_id', true), '')::uuid);