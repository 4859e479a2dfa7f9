CREATE TYPE "public"."vessel_kind" AS ENUM('vat', 'puncheon', 'barrel', 'steel', 'keg', 'glassCarboy', 'plasticCarboy');--> statement-breakpoint
CREATE TYPE "public"."attempt_kind" AS ENUM('signIn', 'setUp');--> statement-breakpoint
CREATE TYPE "public"."role" AS ENUM('owner', 'headBrewer', 'cellarLead', 'cellarHand', 'packager', 'taster', 'auditor');--> statement-breakpoint
CREATE TYPE "public"."token_kind" AS ENUM('setUp');--> statement-breakpoint
CREATE TABLE "audit_events" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"person_id" uuid,
	"action" text NOT NULL,
	"subject_kind" text,
	"subject_id" uuid,
	"detail" jsonb,
	CONSTRAINT "audit_events_pkey" PRIMARY KEY("brewery_id","id")
);
--> statement-breakpoint
ALTER TABLE "audit_events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "breweries" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"time_zone" text NOT NULL,
	"send_at" time DEFAULT '06:30' NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE TABLE "closed_days" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"rule" text,
	"from_month_day" text,
	"to_month_day" text,
	"since" date,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "closed_days_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "closed_days_one_shape" CHECK (("closed_days"."rule" is null) <> ("closed_days"."from_month_day" is null) and ("closed_days"."from_month_day" is null) = ("closed_days"."to_month_day" is null)),
	CONSTRAINT "closed_days_month_days" CHECK ("closed_days"."from_month_day" ~ '^(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$' and "closed_days"."to_month_day" ~ '^(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$')
);
--> statement-breakpoint
ALTER TABLE "closed_days" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "beers" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"family" text NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "beers_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "beers_code_key" UNIQUE("brewery_id","code")
);
--> statement-breakpoint
ALTER TABLE "beers" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "vessels" (
	"brewery_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"kind" "vessel_kind" NOT NULL,
	"working_litres" numeric(12, 3) NOT NULL,
	"wood" boolean NOT NULL,
	"walking_order" integer NOT NULL,
	"beer_id" uuid,
	"created_at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "vessels_pkey" PRIMARY KEY("brewery_id","id"),
	CONSTRAINT "vessels_litres_positive" CHECK ("vessels"."working_litres" > 0),
	CONSTRAINT "vessels_order_positive" CHECK ("vessels"."walking_order" > 0),
	CONSTRAINT "vessels_name_not_blank" CHECK (length(btrim("vessels"."name")) > 0)
);
--> statement-breakpoint
ALTER TABLE "vessels" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "memberships" (
	"brewery_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" "role" NOT NULL,
	"access_until" date,
	"ended_at" timestamp with time zone,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "memberships_pkey" PRIMARY KEY("brewery_id","user_id")
);
--> statement-breakpoint
ALTER TABLE "memberships" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sessions" (
	"token_hash" char(64) PRIMARY KEY NOT NULL,
	"user_id" uuid NOT NULL,
	"brewery_id" uuid,
	"created_at" timestamp with time zone NOT NULL,
	"last_seen_at" timestamp with time zone NOT NULL,
	"expires_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sign_in_attempts" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "sign_in_attempts_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"kind" "attempt_kind" NOT NULL,
	"account_hash" char(64) NOT NULL,
	"address_hash" char(64) NOT NULL,
	"succeeded" boolean NOT NULL,
	"at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "tokens" (
	"id" uuid PRIMARY KEY NOT NULL,
	"kind" "token_kind" NOT NULL,
	"hash" char(64) NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "users_email_lower" CHECK ("users"."email" = lower("users"."email"))
);
--> statement-breakpoint
ALTER TABLE "audit_events" ADD CONSTRAINT "audit_events_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_events" ADD CONSTRAINT "audit_events_person_id_users_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "closed_days" ADD CONSTRAINT "closed_days_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "beers" ADD CONSTRAINT "beers_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "vessels" ADD CONSTRAINT "vessels_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "vessels" ADD CONSTRAINT "vessels_beer_fkey" FOREIGN KEY ("brewery_id","beer_id") REFERENCES "public"."beers"("brewery_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_brewery_id_breweries_id_fk" FOREIGN KEY ("brewery_id") REFERENCES "public"."breweries"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_membership_fkey" FOREIGN KEY ("brewery_id","user_id") REFERENCES "public"."memberships"("brewery_id","user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_events_at_idx" ON "audit_events" USING btree ("brewery_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "vessels_name_key" ON "vessels" USING btree ("brewery_id",lower("name"));--> statement-breakpoint
CREATE INDEX "vessels_walk_idx" ON "vessels" USING btree ("brewery_id","walking_order","name");--> statement-breakpoint
CREATE INDEX "memberships_user_idx" ON "memberships" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_user_idx" ON "sessions" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sessions_expires_idx" ON "sessions" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "sign_in_attempts_address_idx" ON "sign_in_attempts" USING btree ("address_hash","at");--> statement-breakpoint
CREATE INDEX "sign_in_attempts_account_idx" ON "sign_in_attempts" USING btree ("account_hash","at");--> statement-breakpoint
CREATE INDEX "sign_in_attempts_at_idx" ON "sign_in_attempts" USING btree ("at");--> statement-breakpoint
CREATE UNIQUE INDEX "tokens_hash_key" ON "tokens" USING btree ("hash");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_key" ON "users" USING btree ("email");--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "audit_events" AS PERMISSIVE FOR ALL TO public USING ("audit_events"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("audit_events"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "closed_days" AS PERMISSIVE FOR ALL TO public USING ("closed_days"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("closed_days"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "beers" AS PERMISSIVE FOR ALL TO public USING ("beers"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("beers"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "vessels" AS PERMISSIVE FOR ALL TO public USING ("vessels"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("vessels"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "brewery_rows" ON "memberships" AS PERMISSIVE FOR ALL TO public USING ("memberships"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid) WITH CHECK ("memberships"."brewery_id" = nullif(current_setting('undercroft.brewery', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_memberships" ON "memberships" AS PERMISSIVE FOR SELECT TO public USING ("memberships"."user_id" = nullif(current_setting('undercroft.person', true), '')::uuid);