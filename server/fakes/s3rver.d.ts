/** The part of s3rver that is used; the package carries no types. */
declare module 's3rver' {
  import type { Server } from 'node:http';

  interface S3rverOptions {
    directory: string;
    address: string;
    port: number;
    silent: boolean;
    vhostBuckets: boolean;
    configureBuckets: { name: string; configs: readonly (string | Buffer)[] }[];
  }

  export default class S3rver {
    constructor(options: S3rverOptions);
    /** There once it runs. */
    readonly httpServer: Server;
    run(): Promise<{ address: string; port: number }>;
    close(): Promise<void>;
  }
}
