import NextAuth from 'next-auth';
import type { NextRequest } from 'next/server';
import { authOptions } from '@/lib/server/auth-options';
import { environment } from '@/lib/server/environment';

type Context = { params: Promise<{ nextauth: string[] }> };

/** Sign-in, sign-out and their tokens are next-auth's own; it has to know by which address the application is reached. */
async function answer(request: NextRequest, context: Context): Promise<Response> {
  process.env.NEXTAUTH_URL ??= environment().APP_URL;
  const response: unknown = await NextAuth(request, context, authOptions());
  return response as Response;
}

const handler = Object.assign(answer, { action: 'auth.sign-in' as const });

export { handler as GET, handler as POST };
