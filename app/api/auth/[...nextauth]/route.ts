import NextAuth from "next-auth";
import type { NextRequest } from "next/server";
import { authOptions } from "@/app/_server/auth-options";

type Context = { params: Promise<{ nextauth: string[] }> };

async function handle(request: NextRequest, context: Context): Promise<Response> {
  return NextAuth(request, context, authOptions());
}

export { handle as GET, handle as POST };
