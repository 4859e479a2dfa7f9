/** What `GET /api/vessels` asks of the database, as the query builder writes it. */
export const CELLAR_SQL = [
  `select "vessels"."brewery_id", "vessels"."id", "vessels"."name", "vessels"."kind", "working_litres", "wood", "walking_order", "beer_id", "created_at", "vessels"."version", "beers"."code", "beers"."name"
   from "vessels" left join "beers" on "beers"."brewery_id" = "vessels"."brewery_id" and "beers"."id" = "vessels"."beer_id"
   where "vessels"."brewery_id" = $1 order by "vessels"."walking_order", "vessels"."name"`,
  `select "kind", "occurred_on" - date '1970-01-01' as day, "place_in_day", "act_id", "position", "vessel_id", "litres", "brew_id", "to_vessel_id", "loss_litres"
   from "movements" left join "reversals" on "reversals"."brewery_id" = "movements"."brewery_id" and "reversals"."movement_id" = "movements"."id"
   where "movements"."brewery_id" = $1 and "reversals"."id" is null order by "occurred_on", "place_in_day", "act_id", "position"`,
  `select "brews"."id", "brews"."code", "brewed_on", "brewed_on" - date '1970-01-01' as day, "age_band_days", "beer_id", "beers"."code", "beers"."name", "brews"."version"
   from "brews" left join "beers" on "beers"."brewery_id" = "brews"."brewery_id" and "beers"."id" = "brews"."beer_id"
   where "brews"."brewery_id" = $1 order by "brewed_on", "brews"."code"`,
  `select * from "vessel_events" where "brewery_id" = $1 order by "occurred_on", "recorded_at", "id"`,
]
