CREATE TABLE "account_tokens" (
	"id" uuid PRIMARY KEY NOT NULL,
	"kind" text NOT NULL,
	"token_hash" text NOT NULL,
	"user_id" uuid,
	"email" text NOT NULL,
	"name" text,
	"created_at" timestamp (3) with time zone NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "account_tokens_token_hash_key" UNIQUE("token_hash"),
	CONSTRAINT "account_tokens_token_hash_check" CHECK ("account_tokens"."token_hash" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "account_tokens_email_check" CHECK ("account_tokens"."email" = lower(btrim("account_tokens"."email")) and length("account_tokens"."email") between 3 and 254),
	CONSTRAINT "account_tokens_kind_check" CHECK (case "account_tokens"."kind"
        when 'confirm-account' then "account_tokens"."user_id" is null and "account_tokens"."name" is not null
        when 'reset-password' then "account_tokens"."user_id" is not null and "account_tokens"."name" is null
        when 'change-address' then "account_tokens"."user_id" is not null and "account_tokens"."name" is null
        else false end)
);
--> statement-breakpoint
CREATE TABLE "house_rules_editions" (
	"id" uuid PRIMARY KEY NOT NULL,
	"studio_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"rules" jsonb NOT NULL,
	"rules_hash" text NOT NULL,
	"change_summary" text NOT NULL,
	"published_by" uuid NOT NULL,
	"published_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "house_rules_editions_studio_id_number_key" UNIQUE("studio_id","number"),
	CONSTRAINT "house_rules_editions_studio_id_id_key" UNIQUE("studio_id","id"),
	CONSTRAINT "house_rules_editions_number_check" CHECK ("house_rules_editions"."number" > 0),
	CONSTRAINT "house_rules_editions_rules_hash_check" CHECK ("house_rules_editions"."rules_hash" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "invitations" (
	"id" uuid PRIMARY KEY NOT NULL,
	"token_hash" text NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"studio_id" uuid,
	"project_id" uuid,
	"invited_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "invitations_token_hash_key" UNIQUE("token_hash"),
	CONSTRAINT "invitations_token_hash_check" CHECK ("invitations"."token_hash" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "invitations_email_check" CHECK ("invitations"."email" = lower(btrim("invitations"."email")) and length("invitations"."email") between 3 and 254),
	CONSTRAINT "invitations_role_check" CHECK (case "invitations"."role"
        when 'assistant' then "invitations"."studio_id" is not null and "invitations"."project_id" is null
        when 'artist' then "invitations"."project_id" is not null and "invitations"."studio_id" is null
        when 'bandmate' then "invitations"."project_id" is not null and "invitations"."studio_id" is null
        else false end)
);
--> statement-breakpoint
CREATE TABLE "mail_outbox" (
	"id" uuid PRIMARY KEY NOT NULL,
	"cause" text NOT NULL,
	"recipient" text NOT NULL,
	"message" jsonb,
	"created_at" timestamp (3) with time zone NOT NULL,
	"give_up_at" timestamp (3) with time zone NOT NULL,
	"sent_at" timestamp (3) with time zone,
	"given_up_at" timestamp (3) with time zone,
	CONSTRAINT "mail_outbox_cause_key" UNIQUE("cause"),
	CONSTRAINT "mail_outbox_state_check" CHECK (("mail_outbox"."message" is not null)
        = ("mail_outbox"."sent_at" is null and "mail_outbox"."given_up_at" is null)
        and not ("mail_outbox"."sent_at" is not null and "mail_outbox"."given_up_at" is not null))
);
--> statement-breakpoint
CREATE TABLE "project_members" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" text NOT NULL,
	"assistant_studio_id" uuid,
	"joined_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "project_members_project_id_user_id_key" UNIQUE("project_id","user_id"),
	CONSTRAINT "project_members_role_check" CHECK ("project_members"."role" in ('artist', 'bandmate', 'assistant')
        and ("project_members"."role" = 'assistant') = ("project_members"."assistant_studio_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "projects" (
	"id" uuid PRIMARY KEY NOT NULL,
	"kind" text NOT NULL,
	"studio_id" uuid,
	"owner_id" uuid,
	"title" text NOT NULL,
	"artist_name" text,
	"rules_edition_id" uuid,
	"created_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "projects_id_studio_id_key" UNIQUE("id","studio_id"),
	CONSTRAINT "projects_kind_check" CHECK (case "projects"."kind"
        when 'private' then "projects"."owner_id" is not null and "projects"."studio_id" is null
          and "projects"."artist_name" is null and "projects"."rules_edition_id" is null
        when 'studio' then "projects"."owner_id" is null and "projects"."studio_id" is not null
          and "projects"."artist_name" is not null
        else false end),
	CONSTRAINT "projects_title_check" CHECK (length("projects"."title") between 1 and 120)
);
--> statement-breakpoint
CREATE TABLE "rate_limits" (
	"key" text PRIMARY KEY NOT NULL,
	"points" integer NOT NULL,
	"expire" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "report_overviews" (
	"report_id" uuid PRIMARY KEY NOT NULL,
	"overviews" "bytea" NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "report_overviews_overviews_check" CHECK (octet_length("report_overviews"."overviews") <= 8388608)
);
--> statement-breakpoint
CREATE TABLE "report_shares" (
	"id" uuid PRIMARY KEY NOT NULL,
	"report_id" uuid NOT NULL,
	"token_hash" text NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "report_shares_token_hash_key" UNIQUE("token_hash"),
	CONSTRAINT "report_shares_token_hash_check" CHECK ("report_shares"."token_hash" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "reports" (
	"id" uuid PRIMARY KEY NOT NULL,
	"song_id" uuid NOT NULL,
	"submission_id" uuid NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"rules_edition_id" uuid,
	"rules_hash" text NOT NULL,
	"report_schema" integer NOT NULL,
	"measure_version" integer NOT NULL,
	"judge_version" integer NOT NULL,
	"verdict" text NOT NULL,
	"counts" jsonb NOT NULL,
	"judged_again" text NOT NULL,
	"differences" jsonb NOT NULL,
	"report" jsonb NOT NULL,
	CONSTRAINT "reports_song_id_submission_id_key" UNIQUE("song_id","submission_id"),
	CONSTRAINT "reports_rules_hash_check" CHECK ("reports"."rules_hash" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "reports_verdict_check" CHECK ("reports"."verdict" in ('ready', 'look', 'must-fix')),
	CONSTRAINT "reports_judged_again_check" CHECK (("reports"."judged_again" = 'differs') = (jsonb_array_length("reports"."differences") > 0)
        and "reports"."judged_again" in ('same', 'differs', 'not-compared')),
	CONSTRAINT "reports_report_check" CHECK (octet_length("reports"."report"::text) <= 4194304)
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id_hash" text PRIMARY KEY NOT NULL,
	"user_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "sessions_id_hash_check" CHECK ("sessions"."id_hash" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "songs" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"title" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "songs_title_check" CHECK (length("songs"."title") between 1 and 120)
);
--> statement-breakpoint
CREATE TABLE "studio_members" (
	"id" uuid PRIMARY KEY NOT NULL,
	"studio_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" text NOT NULL,
	"joined_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "studio_members_studio_id_user_id_key" UNIQUE("studio_id","user_id"),
	CONSTRAINT "studio_members_role_check" CHECK ("studio_members"."role" in ('owner', 'assistant'))
);
--> statement-breakpoint
CREATE TABLE "studios" (
	"id" uuid PRIMARY KEY NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "studios_slug_key" UNIQUE("slug"),
	CONSTRAINT "studios_slug_check" CHECK ("studios"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length("studios"."slug") between 3 and 40),
	CONSTRAINT "studios_name_check" CHECK (length("studios"."name") between 1 and 80)
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"password_hash" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "users_email_key" UNIQUE("email"),
	CONSTRAINT "users_email_check" CHECK ("users"."email" = lower(btrim("users"."email")) and length("users"."email") between 3 and 254),
	CONSTRAINT "users_name_check" CHECK (length("users"."name") between 1 and 80),
	CONSTRAINT "users_password_hash_check" CHECK ("users"."password_hash" like '$argon2id$%')
);
--> statement-breakpoint
ALTER TABLE "account_tokens" ADD CONSTRAINT "account_tokens_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_rules_editions" ADD CONSTRAINT "house_rules_editions_studio_id_studios_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studios"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_rules_editions" ADD CONSTRAINT "house_rules_editions_published_by_users_id_fk" FOREIGN KEY ("published_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_studio_id_studios_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studios"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_invited_by_users_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_members" ADD CONSTRAINT "project_members_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_members" ADD CONSTRAINT "project_members_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_members" ADD CONSTRAINT "project_members_assistant_fk" FOREIGN KEY ("assistant_studio_id","user_id") REFERENCES "public"."studio_members"("studio_id","user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_members" ADD CONSTRAINT "project_members_assistant_project_fk" FOREIGN KEY ("project_id","assistant_studio_id") REFERENCES "public"."projects"("id","studio_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "projects" ADD CONSTRAINT "projects_studio_id_studios_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studios"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "projects" ADD CONSTRAINT "projects_owner_id_users_id_fk" FOREIGN KEY ("owner_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "projects" ADD CONSTRAINT "projects_rules_edition_fk" FOREIGN KEY ("studio_id","rules_edition_id") REFERENCES "public"."house_rules_editions"("studio_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_overviews" ADD CONSTRAINT "report_overviews_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_shares" ADD CONSTRAINT "report_shares_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_shares" ADD CONSTRAINT "report_shares_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_song_id_songs_id_fk" FOREIGN KEY ("song_id") REFERENCES "public"."songs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_rules_edition_id_house_rules_editions_id_fk" FOREIGN KEY ("rules_edition_id") REFERENCES "public"."house_rules_editions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "songs" ADD CONSTRAINT "songs_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studio_members" ADD CONSTRAINT "studio_members_studio_id_studios_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studios"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studio_members" ADD CONSTRAINT "studio_members_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "account_tokens_user_id_idx" ON "account_tokens" USING btree ("user_id","kind");--> statement-breakpoint
CREATE INDEX "account_tokens_email_idx" ON "account_tokens" USING btree ("email","kind");--> statement-breakpoint
CREATE INDEX "account_tokens_expires_at_idx" ON "account_tokens" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "house_rules_editions_published_by_idx" ON "house_rules_editions" USING btree ("published_by");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_studio_id_email_key" ON "invitations" USING btree ("studio_id","email");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_project_id_email_key" ON "invitations" USING btree ("project_id","email");--> statement-breakpoint
CREATE INDEX "invitations_studio_list_idx" ON "invitations" USING btree ("studio_id","id");--> statement-breakpoint
CREATE INDEX "invitations_project_list_idx" ON "invitations" USING btree ("project_id","id");--> statement-breakpoint
CREATE INDEX "invitations_invited_by_idx" ON "invitations" USING btree ("invited_by");--> statement-breakpoint
CREATE INDEX "invitations_expires_at_idx" ON "invitations" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "mail_outbox_created_at_idx" ON "mail_outbox" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "project_members_list_idx" ON "project_members" USING btree ("project_id","id");--> statement-breakpoint
CREATE INDEX "project_members_user_id_idx" ON "project_members" USING btree ("user_id","project_id");--> statement-breakpoint
CREATE INDEX "project_members_assistant_idx" ON "project_members" USING btree ("assistant_studio_id","user_id");--> statement-breakpoint
CREATE INDEX "projects_studio_id_idx" ON "projects" USING btree ("studio_id","id");--> statement-breakpoint
CREATE UNIQUE INDEX "projects_owner_id_key" ON "projects" USING btree ("owner_id");--> statement-breakpoint
CREATE INDEX "projects_rules_edition_idx" ON "projects" USING btree ("studio_id","rules_edition_id");--> statement-breakpoint
CREATE INDEX "rate_limits_expire_idx" ON "rate_limits" USING btree ("expire");--> statement-breakpoint
CREATE INDEX "report_shares_list_idx" ON "report_shares" USING btree ("report_id","id");--> statement-breakpoint
CREATE INDEX "report_shares_created_by_idx" ON "report_shares" USING btree ("created_by");--> statement-breakpoint
CREATE INDEX "report_shares_expires_at_idx" ON "report_shares" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "reports_song_list_idx" ON "reports" USING btree ("song_id","id");--> statement-breakpoint
CREATE INDEX "reports_creator_list_idx" ON "reports" USING btree ("created_by","id");--> statement-breakpoint
CREATE INDEX "reports_rules_edition_id_idx" ON "reports" USING btree ("rules_edition_id");--> statement-breakpoint
CREATE INDEX "sessions_user_id_idx" ON "sessions" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_expires_at_idx" ON "sessions" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "songs_list_idx" ON "songs" USING btree ("project_id","id");--> statement-breakpoint
CREATE INDEX "studio_members_list_idx" ON "studio_members" USING btree ("studio_id","id");--> statement-breakpoint
CREATE INDEX "studio_members_user_id_idx" ON "studio_members" USING btree ("user_id","id");