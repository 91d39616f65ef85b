CREATE TABLE "edit_request" (
	"project_id" text NOT NULL,
	"actor_id" text NOT NULL,
	"key" text NOT NULL,
	"revision" integer NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "edit_request_project_id_actor_id_key_pk" PRIMARY KEY("project_id","actor_id","key"),
	CONSTRAINT "edit_request_key" CHECK (length("edit_request"."key") between 1 and 64)
);
--> statement-breakpoint
ALTER TABLE "edit_request" ADD CONSTRAINT "edit_request_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "edit_request" ADD CONSTRAINT "edit_request_actor_id_user_id_fk" FOREIGN KEY ("actor_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "edit_request_at" ON "edit_request" USING btree ("at");