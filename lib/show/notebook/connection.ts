/**
 * Where a kernel listens: its connection file (jupyter-client documentation, "Messaging in Jupyter",
 * "Connection files").
 *
 * @module
 */

/**
 * Text of a connection file.
 *
 * @param ports ports in the order shell, control, iopub, stdin, heartbeat
 * @param key secret that signs the messages
 * @returns contents of a Jupyter connection file
 */
export function connectionText(
  [shell, control, iopub, stdin, heartbeat]: number[],
  key: string,
): string {
  return JSON.stringify({
    transport: "tcp",
    ip: "127.0.0.1",
    shell_port: shell,
    control_port: control,
    iopub_port: iopub,
    stdin_port: stdin,
    hb_port: heartbeat,
    signature_scheme: "hmac-sha256",
    key,
  });
}

/**
 * Ports of 127.0.0.1 that nobody listens on now.
 *
 * @param count how many
 * @returns different ports: all were held at once, then let go
 */
export function freePorts(count: number): number[] {
  const listeners = Array.from(
    { length: count },
    () => Deno.listen({ hostname: "127.0.0.1", port: 0 }),
  );
  const ports = listeners.map((listener) => listener.addr.port);
  for (const listener of listeners) listener.close();
  return ports;
}
