import { Migration } from '@mikro-orm/migrations';

/** The tables of the first release: people and teams, ingredients, glasses, specs, versions, notes and history. */
export class Migration20261201InitialSchema extends Migration {
  override up(): void {
    // Trigram indexes serve search inside names. The extension is trusted: the owner of the database may create it.
    this.addSql('create extension if not exists pg_trgm;');
    this.addSql(
      `create table "rate_limit_window" ("key" text not null, "hits" int not null, "resets_at" timestamptz not null, constraint "rate_limit_window_pkey" primary key ("key"));`,
    );
    this.addSql(`create index "rate_limit_window_resets_at_index" on "rate_limit_window" ("resets_at");`);
    this.addSql(
      `create table "team" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "name" text not null, "country" text not null, "currency" text not null, "house_measures" jsonb not null, "created_at" timestamptz not null default now(), constraint "team_pkey" primary key ("id"));`,
    );
    this.addSql(
      `create table "ingredient" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "name" text not null, "category" text not null, "abv_fraction" double precision not null, "sugar_g_per_l" double precision not null, "acids_g_per_l" jsonb not null, "acid_citric_g_per_l" double precision not null, "density_g_per_ml" double precision null, "knowledge" jsonb not null, "piece_mass_g" double precision null, "allergens" jsonb not null, "packs" jsonb not null, "source" text not null, "note" text not null, "retired_at" timestamptz null, "created_at" timestamptz not null default now(), "updated_at" timestamptz not null default now(), constraint "ingredient_pkey" primary key ("id"));`,
    );
    this.addSql(
      `create index "ingredient_by_name" on "ingredient" ("team_id", "name" collate "und-x-icu", "id");`,
    );
    this.addSql(`create index "ingredient_search" on "ingredient" using gin (lower("name") gin_trgm_ops);`);
    this.addSql(
      `create table "glass" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "name" text not null, "profile" jsonb not null, "stem_mm" double precision not null, "brim_ml" double precision not null, "retired_at" timestamptz null, "created_at" timestamptz not null default now(), constraint "glass_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "glass_team_id_index" on "glass" ("team_id");`);
    this.addSql(
      `create table "audit_event" ("id" uuid not null default gen_random_uuid(), "team_id" uuid not null, "at" timestamptz not null default now(), "actor_id" uuid null, "actor_name" text null, "action" text not null, "subject_type" text not null, "subject_id" uuid null, "summary" text not null, constraint "audit_event_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "audit_event_team_id_at_id_index" on "audit_event" ("team_id", "at", "id");`);
    this.addSql(
      `create index "audit_event_team_id_subject_id_at_id_index" on "audit_event" ("team_id", "subject_id", "at", "id");`,
    );
    this.addSql(
      `create table "app_user" ("id" uuid not null default gen_random_uuid(), "email" text not null, "name" text not null, "password_hash" text not null, "created_at" timestamptz not null default now(), constraint "app_user_pkey" primary key ("id"));`,
    );
    this.addSql(`alter table "app_user" add constraint "app_user_email_unique" unique ("email");`);
    this.addSql(
      `create table "spec" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "family_id" uuid not null, "name" text not null, "variant_name" text null, "description" text not null, "draft" jsonb not null, "draft_revision" int not null default 1, "draft_base_version_id" uuid null, "branched_from_version_id" uuid null, "latest_version_id" uuid null, "latest_number" int null, "latest_state" text null, "locked_version_id" uuid null, "locked_number" int null, "final_ml" double precision null, "abv_fraction" double precision null, "sugar_g_per_l" double precision null, "acid_citric_g_per_l" double precision null, "created_at" timestamptz not null default now(), "updated_at" timestamptz not null default now(), "updated_by_id" uuid null, "retired_at" timestamptz null, constraint "spec_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "spec_family_id_index" on "spec" ("family_id");`);
    this.addSql(`create index "spec_by_update" on "spec" ("team_id", "updated_at" desc, "id" desc);`);
    this.addSql(`create index "spec_by_name" on "spec" ("team_id", "name" collate "und-x-icu", "id");`);
    this.addSql(`create index "spec_by_abv" on "spec" ("team_id", coalesce("abv_fraction", -1), "id");`);
    this.addSql(
      `create index "spec_search" on "spec" using gin ((lower("name" || ' ' || coalesce("variant_name", ''))) gin_trgm_ops);`,
    );
    this.addSql(
      `create table "spec_version" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "spec_id" uuid not null, "number" int not null, "parent_id" uuid null, "state" text not null, "body" jsonb not null, "ingredients" jsonb not null, "glass" jsonb null, "house_measures" jsonb not null, "figures" jsonb not null, "calculation_version" text not null, "why" text not null, "changes" jsonb not null, "author_id" uuid null, "created_at" timestamptz not null default now(), "locked_by_id" uuid null, "locked_at" timestamptz null, "lock_statement" text null, "lock_sha256" text null, constraint "spec_version_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "spec_version_team_id_index" on "spec_version" ("team_id");`);
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_spec_id_number_unique" unique ("spec_id", "number");`,
    );
    this.addSql(
      `create table "tasting_note" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "version_id" uuid not null, "author_id" uuid null, "scores" jsonb not null, "words" text not null, "created_at" timestamptz not null default now(), "updated_at" timestamptz not null default now(), constraint "tasting_note_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "tasting_note_team_id_index" on "tasting_note" ("team_id");`);
    this.addSql(
      `create index "tasting_note_version_id_created_at_index" on "tasting_note" ("version_id", "created_at");`,
    );
    this.addSql(
      `create table "session" ("id" text not null, "user_id" uuid not null, "expires_at" timestamptz not null, constraint "session_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "session_user_id_index" on "session" ("user_id");`);
    this.addSql(
      `create table "membership" ("id" uuid not null default gen_random_uuid(), "revision" int not null default 1, "team_id" uuid not null, "user_id" uuid not null, "roles" text[] not null, "joined_at" timestamptz not null default now(), constraint "membership_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "membership_user_id_index" on "membership" ("user_id");`);
    this.addSql(
      `alter table "membership" add constraint "membership_team_id_user_id_unique" unique ("team_id", "user_id");`,
    );
    this.addSql(
      `create table "invitation" ("id" uuid not null default gen_random_uuid(), "team_id" uuid not null, "label" text not null, "roles" text[] not null, "token_hash" text not null, "created_by_id" uuid null, "created_at" timestamptz not null default now(), "expires_at" timestamptz not null, "used_at" timestamptz null, constraint "invitation_pkey" primary key ("id"));`,
    );
    this.addSql(`create index "invitation_team_id_index" on "invitation" ("team_id");`);
    this.addSql(
      `alter table "invitation" add constraint "invitation_token_hash_unique" unique ("token_hash");`,
    );
    this.addSql(
      `alter table "ingredient" add constraint "ingredient_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "glass" add constraint "glass_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "audit_event" add constraint "audit_event_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete no action;`,
    );
    this.addSql(
      `alter table "spec" add constraint "spec_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "spec" add constraint "spec_updated_by_id_foreign" foreign key ("updated_by_id") references "app_user" ("id") on update cascade on delete set null;`,
    );
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_spec_id_foreign" foreign key ("spec_id") references "spec" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_parent_id_foreign" foreign key ("parent_id") references "spec_version" ("id") on update cascade on delete set null;`,
    );
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_author_id_foreign" foreign key ("author_id") references "app_user" ("id") on update cascade on delete set null;`,
    );
    this.addSql(
      `alter table "spec_version" add constraint "spec_version_locked_by_id_foreign" foreign key ("locked_by_id") references "app_user" ("id") on update cascade on delete set null;`,
    );
    this.addSql(
      `alter table "tasting_note" add constraint "tasting_note_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "tasting_note" add constraint "tasting_note_version_id_foreign" foreign key ("version_id") references "spec_version" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "tasting_note" add constraint "tasting_note_author_id_foreign" foreign key ("author_id") references "app_user" ("id") on update cascade on delete set null;`,
    );
    this.addSql(
      `alter table "session" add constraint "session_user_id_foreign" foreign key ("user_id") references "app_user" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "membership" add constraint "membership_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "membership" add constraint "membership_user_id_foreign" foreign key ("user_id") references "app_user" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "invitation" add constraint "invitation_team_id_foreign" foreign key ("team_id") references "team" ("id") on update cascade on delete cascade;`,
    );
    this.addSql(
      `alter table "invitation" add constraint "invitation_created_by_id_foreign" foreign key ("created_by_id") references "app_user" ("id") on update cascade on delete set null;`,
    );

    // The history is append-only, whoever asks.
    this.addSql(`create function refuse_change() returns trigger language plpgsql as $$
      begin
        raise exception 'rows of % are never changed or deleted', tg_table_name using errcode = 'restrict_violation';
      end $$;`);
    this.addSql(`create trigger audit_event_append_only before update or delete on "audit_event"
      for each row execute function refuse_change();`);

    // What a version says never changes; only its state, its lock and its revision do.
    this.addSql(`create function guard_spec_version() returns trigger language plpgsql as $$
      begin
        if (new.id, new.team_id, new.spec_id, new.number, new.body, new.ingredients, new.glass, new.house_measures,
            new.figures, new.calculation_version, new.why, new.changes, new.created_at)
          is distinct from
           (old.id, old.team_id, old.spec_id, old.number, old.body, old.ingredients, old.glass, old.house_measures,
            old.figures, old.calculation_version, old.why, old.changes, old.created_at) then
          raise exception 'a version is immutable' using errcode = 'restrict_violation';
        end if;
        return new;
      end $$;`);
    this.addSql(`create trigger spec_version_immutable before update on "spec_version"
      for each row execute function guard_spec_version();`);
  }
}
