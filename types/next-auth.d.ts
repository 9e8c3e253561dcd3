import 'next-auth';
import 'next-auth/jwt';

/** A signed-in person's token names the row in `sessions` that has to confirm it. */
declare module 'next-auth' {
  interface User {
    id: string;
    sessionId: string;
  }
}

declare module 'next-auth/jwt' {
  interface JWT {
    sessionId?: string;
  }
}
