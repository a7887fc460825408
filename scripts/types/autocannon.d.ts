declare module 'autocannon' {
  interface Options {
    url: string;
    connections?: number;
    /** Seconds. */
    duration?: number;
    headers?: Record<string, string>;
  }
  interface Result {
    requests: { average: number; total: number };
    /** Milliseconds. */
    latency: { p50: number; p99: number };
    errors: number;
    non2xx: number;
  }
  export default function autocannon(options: Options): Promise<Result>;
}
