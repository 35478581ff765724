export declare const isNodeNewEnough: (version: string) => boolean;
export declare const arePackagesCurrent: (root: string) => boolean;
export declare const handOverTo: (script: string) => Promise<void>;
