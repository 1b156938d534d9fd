/** One connection that listens to PostgreSQL's notifications, and takes itself up again when it breaks. */
import pg from 'pg';

export interface Listening {
  stop: () => Promise<void>;
}

const PAUSES_MS = [200, 500, 1_000, 2_000, 5_000] as const;

/**
 * @param channels  names made of letters and underscores
 * @param onMessage called for every notification
 * @param onReady   called each time the connection stands; whatever was sent before that may have been missed
 */
export function listen(
  url: string | undefined,
  channels: readonly string[],
  onMessage: (channel: string, payload: string) => void,
  onReady: () => void,
): Listening {
  let stopped = false;
  let client: pg.Client | null = null;
  let timer: NodeJS.Timeout | undefined;
  let failures = 0;

  const again = () => {
    if (stopped || timer) return;
    timer = setTimeout(
      () => {
        timer = undefined;
        void connect();
      },
      PAUSES_MS[Math.min(failures++, PAUSES_MS.length - 1)],
    );
    timer.unref();
  };

  async function connect(): Promise<void> {
    const own = new pg.Client({ connectionString: url, keepAlive: true, connectionTimeoutMillis: 5_000 });
    client = own;
    const lost = () => {
      if (client !== own) return;
      client = null;
      own.end().catch(() => undefined);
      again();
    };
    own.on('error', lost);
    own.on('end', lost);
    own.on('notification', ({ channel, payload }) => onMessage(channel, payload ?? ''));
    try {
      await own.connect();
      for (const channel of channels) await own.query(`listen ${pg.escapeIdentifier(channel)}`);
      if (stopped) return;
      failures = 0;
      onReady();
    } catch {
      lost();
    }
  }

  void connect();
  return {
    stop: async () => {
      stopped = true;
      clearTimeout(timer);
      const own = client;
      client = null;
      await own?.end().catch(() => undefined);
    },
  };
}
