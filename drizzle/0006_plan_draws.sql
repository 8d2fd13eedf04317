-- Plans made before tolerances were drawn have none.
UPDATE "run" SET "plan" = jsonb_set("plan", '{draws}', '0') WHERE NOT jsonb_exists("plan", 'draws');
