import pg from "pg";
import { Sequelize } from "sequelize";

const holder = globalThis as typeof globalThis & { dewledgerSequelize?: Sequelize };

/** The address is read when a connection opens, not when this file loads: a build has no database. */
function connectTo(config: object): void {
  const address = process.env.DATABASE_URL;
  if (!address) throw new Error("DATABASE_URL is not set");
  const url = new URL(address);
  const sslMode = url.searchParams.get("sslmode");
  Object.assign(config, {
    host: decodeURIComponent(url.hostname),
    port: Number(url.port || 5432),
    database: decodeURIComponent(url.pathname.slice(1)),
    username: decodeURIComponent(url.username),
    password: decodeURIComponent(url.password),
  });
  if (sslMode && sslMode !== "disable") {
    Object.assign(config, {
      dialectOptions: { ssl: { rejectUnauthorized: sslMode.startsWith("verify") } },
    });
  }
}

/**
 * The one connection pool of this process. It lives on `globalThis` because development reloads modules, and each
 * reload would otherwise leave a pool behind.
 */
export const sequelize: Sequelize = (holder.dewledgerSequelize ??= new Sequelize({
  dialect: "postgres",
  dialectModule: pg,
  logging: false,
  pool: {
    max: Number(process.env.DATABASE_POOL_SIZE || 10),
    min: 0,
    idle: 10_000,
    acquire: 20_000,
  },
  define: { underscored: true, timestamps: false },
  hooks: { beforeConnect: connectTo },
}));
