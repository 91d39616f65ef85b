CREATE TABLE "api_token" (
	"id" text PRIMARY KEY NOT NULL,
	"user_id" text NOT NULL,
	"name" text NOT NULL,
	"hash" text NOT NULL,
	"scope" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"last_used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "api_token_scope" CHECK ("api_token"."scope" in ('read', 'write'))
);
--> statement-breakpoint
CREATE TABLE "mail_outbox" (
	"id" text PRIMARY KEY NOT NULL,
	"to" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"status" text NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"next_attempt_at" timestamp with time zone DEFAULT now() NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone,
	CONSTRAINT "mail_outbox_status" CHECK ("mail_outbox"."status" in ('kept', 'queued', 'sent', 'failed'))
);
--> statement-breakpoint
CREATE TABLE "password_reset" (
	"hash" text PRIMARY KEY NOT NULL,
	"user_id" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" text PRIMARY KEY NOT NULL,
	"user_id" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"user_agent" text
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"password_hash" text NOT NULL,
	"site_role" text,
	"is_demo" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "user_site_role" CHECK ("user"."site_role" in ('admin'))
);
--> statement-breakpoint
CREATE TABLE "invitation" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"hash" text NOT NULL,
	"invited_by" text,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "invitation_role" CHECK ("invitation"."role" in ('lead', 'researcher', 'reviewer', 'instructor'))
);
--> statement-breakpoint
CREATE TABLE "membership" (
	"project_id" text NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_project_id_user_id_pk" PRIMARY KEY("project_id","user_id"),
	CONSTRAINT "membership_role" CHECK ("membership"."role" in ('lead', 'researcher', 'reviewer', 'instructor'))
);
--> statement-breakpoint
CREATE TABLE "project" (
	"id" text PRIMARY KEY NOT NULL,
	"slug" text NOT NULL,
	"title" text NOT NULL,
	"summary" text DEFAULT '' NOT NULL,
	"visibility" text DEFAULT 'private' NOT NULL,
	"draft_public" boolean DEFAULT false NOT NULL,
	"licence" text,
	"real_earth" boolean DEFAULT false NOT NULL,
	"held_still" text,
	"revision" integer DEFAULT 0 NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "project_slug_unique" UNIQUE("slug"),
	CONSTRAINT "project_slug" CHECK ("project"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length("project"."slug") <= 64),
	CONSTRAINT "project_visibility" CHECK ("project"."visibility" in ('private', 'link', 'public')),
	CONSTRAINT "project_revision" CHECK ("project"."revision" >= 0)
);
--> statement-breakpoint
CREATE TABLE "geometry" (
	"sha256" text PRIMARY KEY NOT NULL,
	"geojson" jsonb NOT NULL,
	"vertices" integer NOT NULL,
	"encoded" "bytea" NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "geometry_sha256" CHECK ("geometry"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "geometry_vertices" CHECK ("geometry"."vertices" > 0)
);
--> statement-breakpoint
CREATE TABLE "block" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"kind" text NOT NULL,
	"appears_ma" double precision,
	"disappears_ma" double precision,
	"evidence" text DEFAULT 'unconstrained' NOT NULL,
	"source" text,
	"note" text,
	CONSTRAINT "block_code_unique" UNIQUE("project_id","code"),
	CONSTRAINT "block_code" CHECK ("block"."code" ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length("block"."code") <= 64),
	CONSTRAINT "block_kind" CHECK ("block"."kind" in ('craton', 'terrane', 'arc', 'ocean', 'frame', 'other')),
	CONSTRAINT "block_evidence" CHECK ("block"."evidence" in ('published', 'fitted', 'posed', 'unconstrained')),
	CONSTRAINT "block_appears" CHECK ("block"."appears_ma" >= 0 and "block"."appears_ma" <= 4600),
	CONSTRAINT "block_disappears" CHECK ("block"."disappears_ma" >= 0 and "block"."disappears_ma" <= 4600),
	CONSTRAINT "block_life" CHECK ("block"."appears_ma" is null or "block"."disappears_ma" is null or "block"."disappears_ma" < "block"."appears_ma")
);
--> statement-breakpoint
CREATE TABLE "block_outline" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"block" text NOT NULL,
	"sha256" text NOT NULL,
	"outline_older_ma" double precision,
	"outline_younger_ma" double precision,
	"inside" text DEFAULT 'smaller' NOT NULL,
	"source" text,
	CONSTRAINT "block_outline_older" CHECK ("block_outline"."outline_older_ma" >= 0 and "block_outline"."outline_older_ma" <= 4600),
	CONSTRAINT "block_outline_younger" CHECK ("block_outline"."outline_younger_ma" >= 0 and "block_outline"."outline_younger_ma" <= 4600),
	CONSTRAINT "block_outline_life" CHECK ("block_outline"."outline_older_ma" is null or "block_outline"."outline_younger_ma" is null or "block_outline"."outline_younger_ma" < "block_outline"."outline_older_ma"),
	CONSTRAINT "block_outline_inside" CHECK ("block_outline"."inside" in ('smaller', 'larger'))
);
--> statement-breakpoint
CREATE TABLE "covariance" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"rows" integer NOT NULL,
	"entries" double precision[] NOT NULL,
	"cov_dof" double precision,
	"source" text,
	CONSTRAINT "covariance_rows" CHECK ("covariance"."rows" >= 2),
	CONSTRAINT "covariance_entries" CHECK (cardinality("covariance"."entries") = (3 * "covariance"."rows") * (3 * "covariance"."rows" + 1) / 2)
);
--> statement-breakpoint
CREATE TABLE "rotation" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"block" text NOT NULL,
	"relative_to" text NOT NULL,
	"age_ma" double precision NOT NULL,
	"pole_lat" double precision NOT NULL,
	"pole_lon" double precision NOT NULL,
	"angle_deg" double precision NOT NULL,
	"chron" text,
	"age_two_sigma_ma" double precision,
	"evidence" text DEFAULT 'unconstrained' NOT NULL,
	"cov_xx" double precision,
	"cov_xy" double precision,
	"cov_xz" double precision,
	"cov_yy" double precision,
	"cov_yz" double precision,
	"cov_zz" double precision,
	"cov_dof" double precision,
	"joint_covariance" text,
	"joint_position" integer,
	"source" text,
	"note" text,
	CONSTRAINT "rotation_row_unique" UNIQUE("project_id","block","relative_to","age_ma"),
	CONSTRAINT "rotation_other" CHECK ("rotation"."block" <> "rotation"."relative_to"),
	CONSTRAINT "rotation_relative_to" CHECK ("rotation"."relative_to" ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length("rotation"."relative_to") <= 64),
	CONSTRAINT "rotation_age" CHECK ("rotation"."age_ma" >= 0 and "rotation"."age_ma" <= 4600),
	CONSTRAINT "rotation_pole_lat" CHECK ("rotation"."pole_lat" >= -90 and "rotation"."pole_lat" <= 90),
	CONSTRAINT "rotation_pole_lon" CHECK ("rotation"."pole_lon" >= -360 and "rotation"."pole_lon" <= 360),
	CONSTRAINT "rotation_angle" CHECK ("rotation"."angle_deg" >= -720 and "rotation"."angle_deg" <= 720),
	CONSTRAINT "rotation_age_two_sigma" CHECK ("rotation"."age_two_sigma_ma" >= 0),
	CONSTRAINT "rotation_evidence" CHECK ("rotation"."evidence" in ('published', 'fitted', 'posed', 'unconstrained')),
	CONSTRAINT "rotation_covariance_whole" CHECK (num_nulls("rotation"."cov_xx", "rotation"."cov_xy", "rotation"."cov_xz", "rotation"."cov_yy", "rotation"."cov_yz", "rotation"."cov_zz") in (0, 6)),
	CONSTRAINT "rotation_covariance_diagonal" CHECK ("rotation"."cov_xx" is null or ("rotation"."cov_xx" >= 0 and "rotation"."cov_yy" >= 0 and "rotation"."cov_zz" >= 0)),
	CONSTRAINT "rotation_cov_dof" CHECK ("rotation"."cov_dof" > 0),
	CONSTRAINT "rotation_joint" CHECK (("rotation"."joint_covariance" is null) = ("rotation"."joint_position" is null) and ("rotation"."joint_covariance" is null or "rotation"."cov_xx" is null))
);
--> statement-breakpoint
CREATE TABLE "feature" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"block" text NOT NULL,
	"kind" text NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"sha256" text NOT NULL,
	"age_ma" double precision,
	"appears_ma" double precision,
	"disappears_ma" double precision,
	"chron" text,
	"side" text,
	"source" text,
	"note" text,
	CONSTRAINT "feature_kind" CHECK ("feature"."kind" in ('ridge', 'trench', 'transform', 'suture', 'margin', 'isochron', 'fracture_zone', 'pick', 'rock', 'layer')),
	CONSTRAINT "feature_side" CHECK ("feature"."side" in ('left', 'right', 'north', 'south', 'east', 'west')),
	CONSTRAINT "feature_age" CHECK ("feature"."age_ma" >= 0 and "feature"."age_ma" <= 4600),
	CONSTRAINT "feature_appears" CHECK ("feature"."appears_ma" >= 0 and "feature"."appears_ma" <= 4600),
	CONSTRAINT "feature_disappears" CHECK ("feature"."disappears_ma" >= 0 and "feature"."disappears_ma" <= 4600),
	CONSTRAINT "feature_life" CHECK ("feature"."appears_ma" is null or "feature"."disappears_ma" is null or "feature"."disappears_ma" < "feature"."appears_ma")
);
--> statement-breakpoint
CREATE TABLE "claim" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"name" text NOT NULL,
	"statement" jsonb NOT NULL,
	"source" text,
	"note" text,
	CONSTRAINT "claim_name_unique" UNIQUE("project_id","name")
);
--> statement-breakpoint
CREATE TABLE "date_record" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"sample" text NOT NULL,
	"lat" double precision,
	"lon" double precision,
	"block" text,
	"method" text,
	"age_ma" double precision,
	"two_sigma_ma" double precision,
	"pb206_u238" double precision,
	"pb206_u238_2s" double precision,
	"pb207_u235" double precision,
	"pb207_u235_2s" double precision,
	"rho" double precision,
	"event_dated" text,
	"source" text,
	"note" text,
	CONSTRAINT "date_record_lat" CHECK ("date_record"."lat" >= -90 and "date_record"."lat" <= 90),
	CONSTRAINT "date_record_lon" CHECK ("date_record"."lon" >= -360 and "date_record"."lon" <= 360),
	CONSTRAINT "date_record_age" CHECK ("date_record"."age_ma" >= 0 and "date_record"."age_ma" <= 4600),
	CONSTRAINT "date_record_two_sigma" CHECK ("date_record"."two_sigma_ma" >= 0),
	CONSTRAINT "date_record_rho" CHECK ("date_record"."rho" >= -1 and "date_record"."rho" <= 1)
);
--> statement-breakpoint
CREATE TABLE "direction" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"site" text NOT NULL,
	"lat" double precision NOT NULL,
	"lon" double precision NOT NULL,
	"block" text,
	"age_ma" double precision,
	"age_min_ma" double precision,
	"age_max_ma" double precision,
	"declination" double precision,
	"inclination" double precision,
	"strike" double precision,
	"dip" double precision,
	"n" integer,
	"k" double precision,
	"alpha95" double precision,
	"polarity" text,
	"shallowing_f" double precision,
	"rock" text,
	"source" text,
	"note" text,
	CONSTRAINT "direction_lat" CHECK ("direction"."lat" >= -90 and "direction"."lat" <= 90),
	CONSTRAINT "direction_lon" CHECK ("direction"."lon" >= -360 and "direction"."lon" <= 360),
	CONSTRAINT "direction_age" CHECK ("direction"."age_ma" >= 0 and "direction"."age_ma" <= 4600),
	CONSTRAINT "direction_age_min" CHECK ("direction"."age_min_ma" >= 0 and "direction"."age_min_ma" <= 4600),
	CONSTRAINT "direction_age_max" CHECK ("direction"."age_max_ma" >= 0 and "direction"."age_max_ma" <= 4600),
	CONSTRAINT "direction_age_range" CHECK ("direction"."age_min_ma" <= "direction"."age_max_ma"),
	CONSTRAINT "direction_declination" CHECK ("direction"."declination" >= -360 and "direction"."declination" <= 360),
	CONSTRAINT "direction_inclination" CHECK ("direction"."inclination" >= -90 and "direction"."inclination" <= 90),
	CONSTRAINT "direction_n" CHECK ("direction"."n" >= 1),
	CONSTRAINT "direction_k" CHECK ("direction"."k" >= 0),
	CONSTRAINT "direction_alpha95" CHECK ("direction"."alpha95" >= 0 and "direction"."alpha95" <= 180),
	CONSTRAINT "direction_polarity" CHECK ("direction"."polarity" in ('normal', 'reversed', 'mixed', 'unknown')),
	CONSTRAINT "direction_shallowing" CHECK ("direction"."shallowing_f" > 0 and "direction"."shallowing_f" <= 1)
);
--> statement-breakpoint
CREATE TABLE "pole" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"pole" text NOT NULL,
	"block" text,
	"age_ma" double precision,
	"age_min_ma" double precision,
	"age_max_ma" double precision,
	"pole_lat" double precision NOT NULL,
	"pole_lon" double precision NOT NULL,
	"a95" double precision,
	"n" integer,
	"k" double precision,
	"q_criteria" text,
	"r_criteria" text,
	"source" text,
	"note" text,
	CONSTRAINT "pole_pole_lat" CHECK ("pole"."pole_lat" >= -90 and "pole"."pole_lat" <= 90),
	CONSTRAINT "pole_pole_lon" CHECK ("pole"."pole_lon" >= -360 and "pole"."pole_lon" <= 360),
	CONSTRAINT "pole_age" CHECK ("pole"."age_ma" >= 0 and "pole"."age_ma" <= 4600),
	CONSTRAINT "pole_age_range" CHECK ("pole"."age_min_ma" <= "pole"."age_max_ma"),
	CONSTRAINT "pole_a95" CHECK ("pole"."a95" >= 0 and "pole"."a95" <= 180)
);
--> statement-breakpoint
CREATE TABLE "threshold" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"name" text NOT NULL,
	"value" double precision NOT NULL,
	"note" text,
	CONSTRAINT "threshold_name_unique" UNIQUE("project_id","name")
);
--> statement-breakpoint
CREATE TABLE "source" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"cite" text NOT NULL,
	"title" text DEFAULT '' NOT NULL,
	"authors" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"year" integer,
	"container" text,
	"doi" text,
	"licence" text,
	"note" text,
	CONSTRAINT "source_cite_unique" UNIQUE("project_id","cite"),
	CONSTRAINT "source_year" CHECK ("source"."year" >= 1600 and "source"."year" <= 2200)
);
--> statement-breakpoint
CREATE TABLE "change" (
	"project_id" text NOT NULL,
	"revision" integer NOT NULL,
	"position" integer NOT NULL,
	"actor_id" text,
	"action" text NOT NULL,
	"label" text NOT NULL,
	"entity" text NOT NULL,
	"entity_id" text NOT NULL,
	"before" jsonb,
	"after" jsonb,
	"reverts_revision" integer,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "change_project_id_revision_position_pk" PRIMARY KEY("project_id","revision","position"),
	CONSTRAINT "change_action" CHECK ("change"."action" in ('edit', 'import', 'undo', 'redo', 'restore')),
	CONSTRAINT "change_something" CHECK ("change"."before" is not null or "change"."after" is not null),
	CONSTRAINT "change_reverts" CHECK (("change"."action" in ('undo', 'redo')) = ("change"."reverts_revision" is not null))
);
--> statement-breakpoint
CREATE TABLE "import_file" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"name" text NOT NULL,
	"kind" text NOT NULL,
	"sha256" text NOT NULL,
	"content" "bytea" NOT NULL,
	"report" jsonb NOT NULL,
	"rejected" text,
	"revision" integer,
	"imported_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "import_file_sha256" CHECK ("import_file"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "sheet" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"title" text NOT NULL,
	"version" integer,
	"layout" jsonb NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "version" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text NOT NULL,
	"number" integer NOT NULL,
	"parent" integer,
	"sha256" text NOT NULL,
	"manifest" text NOT NULL,
	"revision" integer NOT NULL,
	"title" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"licence" text,
	"state" text DEFAULT 'released' NOT NULL,
	"released_by" text,
	"released_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "version_number_unique" UNIQUE("project_id","number"),
	CONSTRAINT "version_sha256" CHECK ("version"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "version_number" CHECK ("version"."number" >= 1 and ("version"."parent" is null or "version"."parent" < "version"."number")),
	CONSTRAINT "version_state" CHECK ("version"."state" in ('released', 'in_review', 'accepted', 'accepted_with_changes', 'sent_back', 'published'))
);
--> statement-breakpoint
CREATE TABLE "version_geometry" (
	"version_id" text NOT NULL,
	"sha256" text NOT NULL,
	CONSTRAINT "version_geometry_version_id_sha256_pk" PRIMARY KEY("version_id","sha256")
);
--> statement-breakpoint
CREATE TABLE "job" (
	"id" text PRIMARY KEY NOT NULL,
	"project_id" text,
	"kind" text NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"progress" double precision DEFAULT 0 NOT NULL,
	"input" jsonb NOT NULL,
	"result" jsonb,
	"problem" jsonb,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	CONSTRAINT "job_state_known" CHECK ("job"."state" in ('queued', 'running', 'done', 'failed', 'cancelled')),
	CONSTRAINT "job_progress" CHECK ("job"."progress" >= 0 and "job"."progress" <= 1)
);
--> statement-breakpoint
ALTER TABLE "api_token" ADD CONSTRAINT "api_token_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "password_reset" ADD CONSTRAINT "password_reset_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_invited_by_user_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project" ADD CONSTRAINT "project_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block" ADD CONSTRAINT "block_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block_outline" ADD CONSTRAINT "block_outline_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block_outline" ADD CONSTRAINT "block_outline_sha256_geometry_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."geometry"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block_outline" ADD CONSTRAINT "block_outline_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "covariance" ADD CONSTRAINT "covariance_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rotation" ADD CONSTRAINT "rotation_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rotation" ADD CONSTRAINT "rotation_joint_covariance_covariance_id_fk" FOREIGN KEY ("joint_covariance") REFERENCES "public"."covariance"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rotation" ADD CONSTRAINT "rotation_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "feature" ADD CONSTRAINT "feature_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "feature" ADD CONSTRAINT "feature_sha256_geometry_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."geometry"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "feature" ADD CONSTRAINT "feature_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "claim" ADD CONSTRAINT "claim_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "date_record" ADD CONSTRAINT "date_record_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "date_record" ADD CONSTRAINT "date_record_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "direction" ADD CONSTRAINT "direction_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "direction" ADD CONSTRAINT "direction_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "pole" ADD CONSTRAINT "pole_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pole" ADD CONSTRAINT "pole_block" FOREIGN KEY ("project_id","block") REFERENCES "public"."block"("project_id","code") ON DELETE no action ON UPDATE cascade;--> statement-breakpoint
ALTER TABLE "threshold" ADD CONSTRAINT "threshold_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "source" ADD CONSTRAINT "source_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change" ADD CONSTRAINT "change_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change" ADD CONSTRAINT "change_actor_id_user_id_fk" FOREIGN KEY ("actor_id") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_file" ADD CONSTRAINT "import_file_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_file" ADD CONSTRAINT "import_file_imported_by_user_id_fk" FOREIGN KEY ("imported_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet" ADD CONSTRAINT "sheet_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet" ADD CONSTRAINT "sheet_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "version" ADD CONSTRAINT "version_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "version" ADD CONSTRAINT "version_released_by_user_id_fk" FOREIGN KEY ("released_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "version_geometry" ADD CONSTRAINT "version_geometry_version_id_version_id_fk" FOREIGN KEY ("version_id") REFERENCES "public"."version"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "version_geometry" ADD CONSTRAINT "version_geometry_sha256_geometry_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."geometry"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "api_token_hash_unique" ON "api_token" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "api_token_user" ON "api_token" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "mail_outbox_created" ON "mail_outbox" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "mail_outbox_due" ON "mail_outbox" USING btree ("status","next_attempt_at");--> statement-breakpoint
CREATE INDEX "password_reset_user" ON "password_reset" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "session_user" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "user_email_unique" ON "user" USING btree (lower("email"));--> statement-breakpoint
CREATE UNIQUE INDEX "invitation_hash_unique" ON "invitation" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "invitation_project" ON "invitation" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "membership_user" ON "membership" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "block_outline_by_block" ON "block_outline" USING btree ("project_id","block");--> statement-breakpoint
CREATE INDEX "block_outline_geometry" ON "block_outline" USING btree ("sha256");--> statement-breakpoint
CREATE INDEX "covariance_project" ON "covariance" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "feature_by_block" ON "feature" USING btree ("project_id","block");--> statement-breakpoint
CREATE INDEX "feature_geometry" ON "feature" USING btree ("sha256");--> statement-breakpoint
CREATE INDEX "date_record_by_block" ON "date_record" USING btree ("project_id","block");--> statement-breakpoint
CREATE INDEX "direction_by_block" ON "direction" USING btree ("project_id","block");--> statement-breakpoint
CREATE INDEX "pole_by_block" ON "pole" USING btree ("project_id","block");--> statement-breakpoint
CREATE INDEX "change_entity" ON "change" USING btree ("project_id","entity","entity_id");--> statement-breakpoint
CREATE INDEX "import_file_project" ON "import_file" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "sheet_project" ON "sheet" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "version_geometry_sha256" ON "version_geometry" USING btree ("sha256");--> statement-breakpoint
CREATE INDEX "job_state" ON "job" USING btree ("state","created_at");