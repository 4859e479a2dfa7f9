/** What `GET /api/vessels` asks of the database, as the query builder writes it. */
export const CELLAR_SQL = [
  `select "vessels"."brewery_id", "vessels"."id", "vessels"."name", "vessels"."kind", "working_litres", "wood", "walking_order", "beer_id", "created_at", "vessels"."version", "beers"."code", "beers"."name"
   from "vessels" left join "beers" on "beers"."brewery_id" = "vessels"."brewery_id" and "beers"."id" = "vessels"."beer_id"
   where "vessels"."brewery_id" = $1 order by "vessels"."walking_order", "vessels"."name"`,
  `select string_agg(m.kind::text || ',' || (m.occurred_on - date '1970-01-01') || ',' || m.place_in_day || ',' || m.act_id || ',' || m.position || ',' || m.vessel_id
     || ',' || m.litres || ',' || coalesce(m.brew_id::text, '') || ',' || coalesce(m.to_vessel_id::text, '') || ',' || coalesce(m.loss_litres::text, ''),
     chr(10) order by m.occurred_on, m.place_in_day, m.act_id, m.position) as lines
   from movements m where m.brewery_id = $1 and m.id not in (select r.movement_id from reversals r where r.brewery_id = $1)`,
  `select "brews"."id", "brews"."code", "brewed_on", "brewed_on" - date '1970-01-01' as day, "age_band_days", "beer_id", "beers"."code", "beers"."name", "brews"."version"
   from "brews" left join "beers" on "beers"."brewery_id" = "brews"."brewery_id" and "beers"."id" = "brews"."beer_id"
   where "brews"."brewery_id" = $1 order by "brewed_on", "brews"."code"`,
  `select * from "vessel_events" where "brewery_id" = $1 order by "occurred_on", "recorded_at", "id"`,
]
