// The editor's own table of services, which its package does not describe.
declare module "monaco-editor/editor/standalone/browser/standaloneServices.js" {
  export const StandaloneServices: { get<T>(service: { readonly is: T }): T };
}

declare module "monaco-editor/platform/storage/common/storage.js" {
  interface Storage {
    store(key: string, value: boolean, scope: number, target: number): void;
  }
  export const IStorageService: { readonly is: Storage };
}
