CREATE TYPE "public"."loss_reason" AS ENUM('evaporation', 'leak', 'lees', 'transfer', 'dumped');--> statement-breakpoint
CREATE TYPE "public"."measuring_method" AS ENUM('weighed', 'flowMeter', 'dip', 'sight', 'guess');--> statement-breakpoint
CREATE TYPE "public"."movement_kind" AS ENUM('in', 'draw', 'move', 'loss', 'sample', 'addition');--> statement-breakpoint
CREATE TYPE "public"."vessel_event_kind" AS ENUM('called', 'held', 'setApart', 'freed', 'emptied', 'soaking', 'soaked', 'away', 'back', 'retired', 'fruitIn', 'fruitOut', 'gravityWatch', 'gravityWatchEnded', 'resized');--> statement-breakpoint
CREATE TABLE "acts" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"note" text,
	"recorded_at" timestamp with time zone NOT NULL,
	"recorded_by" uuid NOT NULL,
	CONSTRAINT "acts_pkey" PRIMARY KEY("brewery_id","id")
);
--> statement-breakpoint
ALTER TABLE "acts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "brews" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"code" text NOT NULL,
	"brewed_on" date NOT NULL,
	"age_band_days" integer,
	"beer_id" uuid,
	"created_at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "brews_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "brews_code_key" UNIQUE("brewery_id","code"),
	CONSTRAINT "brews_age_band_positive" CHECK ("brews"."age_band_days" > 0)
);
--> statement-breakpoint
ALTER TABLE "brews" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "ledger_notes" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"act_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"vessel_id" uuid NOT NULL,
	"noted_on" date NOT NULL,
	"text" text NOT NULL,
	CONSTRAINT "ledger_notes_pkey" PRIMARY KEY("brewery_id","id")
);
--> statement-breakpoint
ALTER TABLE "ledger_notes" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "movements" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"act_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"kind" "movement_kind" NOT NULL,
	"vessel_id" uuid NOT NULL,
	"litres" numeric(12, 3) NOT NULL,
	"occurred_on" date NOT NULL,
	"place_in_day" smallint NOT NULL,
	"method" "measuring_method",
	"note" text,
	"brew_id" uuid,
	"lot" text,
	"to_vessel_id" uuid,
	"loss_litres" numeric(12, 3),
	"reason" "loss_reason",
	CONSTRAINT "movements_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "movements_place_key" UNIQUE("brewery_id","act_id","position"),
	CONSTRAINT "movements_litres_positive" CHECK ("movements"."litres" > 0),
	CONSTRAINT "movements_brew_of_in" CHECK (("movements"."kind" = 'in') = ("movements"."brew_id" is not null)),
	CONSTRAINT "movements_lot_of_draw" CHECK ("movements"."kind" = 'draw' or "movements"."lot" is null),
	CONSTRAINT "movements_reason_of_loss" CHECK (("movements"."kind" = 'loss') = ("movements"."reason" is not null)),
	CONSTRAINT "movements_target_of_move" CHECK (("movements"."kind" = 'move') = ("movements"."to_vessel_id" is not null) and ("movements"."kind" = 'move' or "movements"."loss_litres" is null)),
	CONSTRAINT "movements_not_into_itself" CHECK ("movements"."to_vessel_id" <> "movements"."vessel_id"),
	CONSTRAINT "movements_loss_of_move" CHECK ("movements"."loss_litres" >= 0 and "movements"."loss_litres" <= "movements"."litres")
);
--> statement-breakpoint
ALTER TABLE "movements" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reversals" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"movement_id" uuid NOT NULL,
	"request_id" uuid NOT NULL,
	"reason" text NOT NULL,
	"reversed_at" timestamp with time zone NOT NULL,
	"reversed_by" uuid NOT NULL,
	CONSTRAINT "reversals_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "reversals_movement_key" UNIQUE("brewery_id","movement_id")
);
--> statement-breakpoint
ALTER TABLE "reversals" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "vessel_events" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"vessel_id" uuid NOT NULL,
	"kind" "vessel_event_kind" NOT NULL,
	"occurred_on" date NOT NULL,
	"reason" text,
	"from_litres" numeric(12, 3),
	"to_litres" numeric(12, 3),
	"recorded_at" timestamp with time zone NOT NULL,
	"recorded_by" uuid NOT NULL,
	CONSTRAINT "vessel_events_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "vessel_events_resize" CHECK (("vessel_events"."kind" = 'resized') = ("vessel_events"."from_litres" is not null and "vessel_events"."to_litres" is not null))
);
--> statement-breakpoint
ALTER TABLE "vessel_events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "acts" ADD CONSTRAINT "acts_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acts" ADD CONSTRAINT "acts_recorded_by_users_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "brews" ADD CONSTRAINT "brews_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "brews" ADD CONSTRAINT "brews_beer_fkey" FOREIGN KEY ("brewery_id","beer_id") REFERENCES "public"."beers"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_notes" ADD CONSTRAINT "ledger_notes_act_fkey" FOREIGN KEY ("brewery_id","act_id") REFERENCES "public"."acts"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_notes" ADD CONSTRAINT "ledger_notes_vessel_fkey" FOREIGN KEY ("brewery_id","vessel_id") REFERENCES "public"."vessels"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movements" ADD CONSTRAINT "movements_act_fkey" FOREIGN KEY ("brewery_id","act_id") REFERENCES "public"."acts"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movements" ADD CONSTRAINT "movements_vessel_fkey" FOREIGN KEY ("brewery_id","vessel_id") REFERENCES "public"."vessels"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movements" ADD CONSTRAINT "movements_to_vessel_fkey" FOREIGN KEY ("brewery_id","to_vessel_id") REFERENCES "public"."vessels"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "movements" ADD CONSTRAINT "movements_brew_fkey" FOREIGN KEY ("brewery_id","brew_id") REFERENCES "public"."brews"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reversals" ADD CONSTRAINT "reversals_reversed_by_users_id_fk" FOREIGN KEY ("reversed_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reversals" ADD CONSTRAINT "reversals_movement_fkey" FOREIGN KEY ("brewery_id","movement_id") REFERENCES "public"."movements"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "vessel_events" ADD CONSTRAINT "vessel_events_recorded_by_users_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "vessel_events" ADD CONSTRAINT "vessel_events_vessel_fkey" FOREIGN KEY ("brewery_id","vessel_id") REFERENCES "public"."vessels"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "ledger_notes_vessel_idx" ON "ledger_notes" USING btree ("brewery_id","vessel_id");--> statement-breakpoint
CREATE INDEX "movements_vessel_idx" ON "movements" USING btree ("brewery_id","vessel_id","occurred_on");--> statement-breakpoint
CREATE INDEX "movements_to_vessel_idx" ON "movements" USING btree ("brewery_id","to_vessel_id");--> statement-breakpoint
CREATE INDEX "movements_brew_idx" ON "movements" USING btree ("brewery_id","brew_id");--> statement-breakpoint
CREATE INDEX "reversals_request_idx" ON "reversals" USING btree ("brewery_id","request_id");--> statement-breakpoint
CREATE INDEX "vessel_events_vessel_idx" ON "vessel_events" USING btree ("brewery_id","vessel_id","occurred_on");--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "acts" AS PERMISSIVE FOR ALL TO public USING ("acts"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("acts"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "brews" AS PERMISSIVE FOR ALL TO public USING ("brews"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("brews"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "ledger_notes" AS PERMISSIVE FOR ALL TO public USING ("ledger_notes"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("ledger_notes"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "movements" AS PERMISSIVE FOR ALL TO public USING ("movements"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("movements"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "reversals" AS PERMISSIVE FOR ALL TO public USING ("reversals"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("reversals"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "vessel_events" AS PERMISSIVE FOR ALL TO public USING ("vessel_events"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("vessel_events"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);