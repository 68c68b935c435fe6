declare module 's3rver' {
  import type { IncomingMessage, ServerResponse } from 'node:http';

  interface Options {
    directory: string;
    silent: boolean;
    resetOnClose: boolean;
    vhostBuckets: boolean;
    configureBuckets: { name: string }[];
  }

  class S3rver {
    constructor(options: Options);
    configureBuckets(): Promise<void>;
    callback(): (request: IncomingMessage, response: ServerResponse) => void;
  }

  export = S3rver;
}
