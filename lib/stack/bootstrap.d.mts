export declare function handOver(file: string): Promise<void>;
export declare function installed(root: string): boolean;
