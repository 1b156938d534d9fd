import type { SessionClaim } from './actor-of-session';

declare module 'next-auth' {
  interface User {
    sessionVersion: number;
    sessionId: string;
  }
  interface Session {
    claim: SessionClaim;
  }
}

declare module 'next-auth/jwt' {
  interface JWT {
    sessionVersion: number;
    sessionId?: string;
  }
}
