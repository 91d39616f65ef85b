-- One edit may swap the ages of two rows, or rename a block together with its rows: these hold at its end.
ALTER TABLE "rotation" DROP CONSTRAINT "rotation_row_unique";--> statement-breakpoint
ALTER TABLE "rotation" ADD CONSTRAINT "rotation_row_unique" UNIQUE ("project_id", "block", "relative_to", "age_ma") DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "source" DROP CONSTRAINT "source_cite_unique";--> statement-breakpoint
ALTER TABLE "source" ADD CONSTRAINT "source_cite_unique" UNIQUE ("project_id", "cite") DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "block_outline" ALTER CONSTRAINT "block_outline_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "rotation" ALTER CONSTRAINT "rotation_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "feature" ALTER CONSTRAINT "feature_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "direction" ALTER CONSTRAINT "direction_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "pole" ALTER CONSTRAINT "pole_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
ALTER TABLE "date_record" ALTER CONSTRAINT "date_record_block" DEFERRABLE INITIALLY IMMEDIATE;--> statement-breakpoint
CREATE FUNCTION "refuse_version_change"() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'a released version never changes' USING ERRCODE = 'integrity_constraint_violation', CONSTRAINT = 'version_immutable', TABLE = 'version';
END $$;--> statement-breakpoint
CREATE TRIGGER "version_content_immutable" BEFORE UPDATE ON "version" FOR EACH ROW
WHEN (OLD."manifest" IS DISTINCT FROM NEW."manifest" OR OLD."sha256" IS DISTINCT FROM NEW."sha256" OR OLD."number" IS DISTINCT FROM NEW."number"
  OR OLD."parent" IS DISTINCT FROM NEW."parent" OR OLD."project_id" IS DISTINCT FROM NEW."project_id" OR OLD."released_at" IS DISTINCT FROM NEW."released_at")
EXECUTE FUNCTION "refuse_version_change"();--> statement-breakpoint
CREATE TRIGGER "version_kept" BEFORE DELETE ON "version" FOR EACH ROW EXECUTE FUNCTION "refuse_version_change"();--> statement-breakpoint
CREATE FUNCTION "refuse_geometry_change"() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'a geometry is its hash and never changes' USING ERRCODE = 'integrity_constraint_violation', CONSTRAINT = 'geometry_immutable', TABLE = 'geometry';
END $$;--> statement-breakpoint
CREATE TRIGGER "geometry_content_immutable" BEFORE UPDATE ON "geometry" FOR EACH ROW EXECUTE FUNCTION "refuse_geometry_change"();
