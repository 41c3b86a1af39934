CREATE TABLE "declined_letters" (
	"user_id" uuid NOT NULL,
	"letter" text NOT NULL,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "declined_letters_user_id_letter_pk" PRIMARY KEY("user_id","letter"),
	CONSTRAINT "declined_letters_optional" CHECK ("letter" in ('reminder', 'report-received'))
);
--> statement-breakpoint
CREATE TABLE "two_factors" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"secret" text NOT NULL,
	"backup_codes" text NOT NULL,
	"verified" boolean DEFAULT false NOT NULL,
	"failed_verification_count" integer DEFAULT 0 NOT NULL,
	"locked_until" timestamp with time zone,
	CONSTRAINT "two_factors_user_id_unique" UNIQUE("user_id")
);
--> statement-breakpoint
ALTER TABLE "users" ADD COLUMN "typed_orcid" text;--> statement-breakpoint
ALTER TABLE "users" ADD COLUMN "two_factor_enabled" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "declined_letters" ADD CONSTRAINT "declined_letters_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "two_factors" ADD CONSTRAINT "two_factors_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "users" ADD CONSTRAINT "users_typed_orcid_form" CHECK ("users"."typed_orcid" ~ '^\d{4}-\d{4}-\d{4}-\d{3}[\dX]$');--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON two_factors TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON declined_letters TO counterfoil_web;
--> statement-breakpoint
-- The signer prints authenticated iDs beside the names; of a way in it sees whose and which, never a password.
GRANT SELECT (user_id, provider_id, account_id) ON accounts TO counterfoil_signer;
