-- What became of a failed point is kept in the words that pages show.
UPDATE "shard" SET "failures" = (
  SELECT jsonb_agg(jsonb_set(one, '{outcome}', to_jsonb(CASE one->>'outcome'
    WHEN 'iteration limit' THEN 'did not settle'
    WHEN 'step too small' THEN 'came to a stand'
    WHEN 'singular' THEN 'undetermined'
    WHEN 'not finite' THEN 'out of bounds'
    ELSE one->>'outcome' END)) ORDER BY place)
  FROM jsonb_array_elements("failures") WITH ORDINALITY AS failed(one, place)
) WHERE "failures" <> '[]'::jsonb;
