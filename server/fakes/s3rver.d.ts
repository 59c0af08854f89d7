/** The part of s3rver that is used; the package carries no types. */
declare module 's3rver' {
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
    run(): Promise<{ address: string; port: number }>;
    close(): Promise<void>;
  }
}
