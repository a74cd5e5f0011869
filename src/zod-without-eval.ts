// Zod probes `new Function` for its fast path, which the content security policy forbids and reports. It takes this
// setting only when it is there before zod itself, hence a module of its own, imported first by main.ts.
(globalThis as { __zod_globalConfig?: { jitless: boolean } }).__zod_globalConfig = { jitless: true };
