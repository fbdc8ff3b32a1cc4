-- Roles of the database, made once by a superuser before the first migration.
-- Passwords are set by whoever makes the cluster: ALTER ROLE … PASSWORD '…'.
CREATE ROLE tarnwright_owner LOGIN;                 -- owns the schema, runs migrations, nothing else
CREATE ROLE tarnwright_app LOGIN NOBYPASSRLS;       -- the web processes: one tenant a transaction
CREATE ROLE tarnwright_worker LOGIN NOBYPASSRLS;    -- jobs that cross tenants by nature
CREATE ROLE tarnwright_admin LOGIN NOBYPASSRLS;     -- the platform's admin area: no personal data of shoppers
CREATE ROLE tarnwright_meter NOLOGIN NOBYPASSRLS;   -- owns the key look-up and the group commit, nothing else
GRANT tarnwright_meter TO tarnwright_owner;         -- so that a migration may give these functions to it
