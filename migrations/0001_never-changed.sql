-- What somebody published, stored or agreed to stays as it was: editions of house rules,
-- reports and their overviews can be read and added, never changed or removed. Whoever must
-- remove a row for a lawful reason switches the trigger off in a migration that says why.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	RAISE EXCEPTION 'rows of % are never changed', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
CREATE TRIGGER house_rules_editions_never_changed BEFORE UPDATE OR DELETE ON "house_rules_editions"
	FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER house_rules_editions_never_emptied BEFORE TRUNCATE ON "house_rules_editions"
	FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER reports_never_changed BEFORE UPDATE OR DELETE ON "reports"
	FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER reports_never_emptied BEFORE TRUNCATE ON "reports"
	FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER report_overviews_never_changed BEFORE UPDATE OR DELETE ON "report_overviews"
	FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER report_overviews_never_emptied BEFORE TRUNCATE ON "report_overviews"
	FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- Overviews arrive as gzip: compressing them a second time costs time and gains nothing.
ALTER TABLE "report_overviews" ALTER COLUMN "overviews" SET STORAGE EXTERNAL;
