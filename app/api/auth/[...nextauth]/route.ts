import NextAuth from 'next-auth';
import type { NextRequest } from 'next/server';
import { authOptions } from '@/lib/auth/auth-options';

const handler = (request: NextRequest, context: { params: Promise<{ nextauth: string[] }> }) =>
  NextAuth(request, context, authOptions()) as Promise<Response>;

export { handler as GET, handler as POST };
