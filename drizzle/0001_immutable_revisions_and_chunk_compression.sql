-- A revision is what runs, reviews and links refer to: once written it never changes.
CREATE FUNCTION refuse_revision_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'revision % of netlist % is immutable', OLD.number, OLD.netlist_id
    USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
CREATE TRIGGER revision_immutable BEFORE UPDATE OR DELETE ON "revision"
  FOR EACH ROW EXECUTE FUNCTION refuse_revision_change();
--> statement-breakpoint
CREATE TRIGGER revision_not_truncated BEFORE TRUNCATE ON "revision"
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_revision_change();
--> statement-breakpoint
ALTER TABLE "chunk" ALTER COLUMN "data" SET COMPRESSION lz4;
