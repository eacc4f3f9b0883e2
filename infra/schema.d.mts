export function dumpSchema(options: { bin: string; url: string }): Promise<string>
