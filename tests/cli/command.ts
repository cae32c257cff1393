/** A command as deno.json has it: the launcher may only start a child, which gets narrow permissions. */
export async function command(task: "run" | "grid" | "audit", ...args: string[]) {
  const child = new Deno.Command(Deno.execPath(), {
    args: [
      "run",
      "--no-prompt",
      "--allow-run",
      "--allow-env=INIT_CWD",
      `lib/cli/${task}.ts`,
      ...args,
    ],
    env: { PATH: Deno.env.get("PATH") ?? "", NO_COLOR: "1" },
  });
  const { code, stdout, stderr } = await child.output(), decoder = new TextDecoder();
  return { code, text: decoder.decode(stdout) + decoder.decode(stderr) };
}
