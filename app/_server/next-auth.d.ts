import "next-auth";
import "next-auth/jwt";

declare module "next-auth" {
  interface User {
    id: string;
    sessionEpoch: number;
  }

  interface Session {
    user: { id: string };
  }
}

declare module "next-auth/jwt" {
  interface JWT {
    sessionEpoch?: number;
  }
}
