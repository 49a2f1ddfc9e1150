declare module 's3rver' {
  export default class S3rver {
    constructor(options: {
      address: string;
      port: number;
      directory: string;
      silent: boolean;
      configureBuckets: { name: string; configs: unknown[] }[];
    });
    run(): Promise<{ address: string; port: number }>;
    close(): Promise<void>;
  }
}
