-- The application's role may work on rows, within the policies, and on nothing else.
REVOKE CREATE ON SCHEMA public FROM PUBLIC;--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO "herringbone_app";--> statement-breakpoint
GRANT SELECT, UPDATE ON "installation" TO "herringbone_app";--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "person" TO "herringbone_app";--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "team", "membership", "worksheet" TO "herringbone_app";--> statement-breakpoint
INSERT INTO "installation" ("single") VALUES (true);--> statement-breakpoint
-- From here on the policies bind the owner too.
ALTER TABLE "installation" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "person" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "team" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "membership" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "worksheet" FORCE ROW LEVEL SECURITY;
