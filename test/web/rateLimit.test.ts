import express from "express";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { clientOf, limitRate, tokenBuckets } from "../../server/web/rateLimit.js";

describe("a token bucket", () => {
  test("gives its burst, then one token each time its due time comes, and says when that is", () => {
    let now = 5000;
    const buckets = tokenBuckets({ burst: 3, perSecond: 2 }, () => now);
    expect([1, 2, 3].map(() => buckets.take("a"))).toEqual([0, 0, 0]);
    expect(buckets.take("a")).toBeCloseTo(0.5);
    expect(buckets.take("b")).toBe(0);
    now += 250;
    expect(buckets.take("a")).toBeCloseTo(0.25);
    now += 250;
    expect([1, 2].map(() => buckets.take("a") === 0)).toEqual([true, false]);
    now += 60_000;
    expect([1, 2, 3, 4].map(() => buckets.take("a") === 0)).toEqual([true, true, true, false]);
    buckets.refill("a");
    expect(buckets.take("a")).toBe(0);
  });

  test("a million clients are not all remembered, the latest are, and forgetting does not hold up the server", () => {
    const buckets = tokenBuckets({ burst: 1, perSecond: 1 }, () => 0);
    const before = process.memoryUsage().heapUsed;
    const start = performance.now();
    for (let client = 0; client < 1_000_000; client += 1) buckets.take(String(client));
    expect(performance.now() - start).toBeLessThan(5000);
    expect([buckets.take("999999"), buckets.take("990001"), buckets.take("1")]).toEqual([1, 1, 0]);
    expect(process.memoryUsage().heapUsed - before).toBeLessThan(60e6);
  });
});

describe("whom a request is counted for", () => {
  test.each([
    ["203.0.113.5", "203.0.113.5"],
    ["::ffff:203.0.113.5", "203.0.113.5"],
    ["2001:db8:1:2:3:4:5:6", "2001:db8:1:2"],
    ["2001:DB8:1:2::9", "2001:db8:1:2"],
    ["2001:db8::1", "2001:db8:0:0"],
    ["::1", "0:0:0:0"],
    ["fe80::1%eth0", "fe80:0:0:0"],
    [undefined, ""],
  ])("%s counts as %s", (address, client) => {
    expect(clientOf(address)).toBe(client);
  });
});

describe("the limit of the server", () => {
  test("what takes work has one that comes back with time, and does not eat up that of pages", async () => {
    let now = 0;
    const app = express();
    app.use(limitRate(() => now));
    app.all("/api/any", (_request, response) => {
      response.send("answered");
    });
    const ask = async (method: "get" | "post", times: number) => {
      let answered = 0;
      for (let time = 0; time < times; time += 1) {
        if ((await request(app)[method]("/api/any")).status === 200) answered += 1;
      }
      return answered;
    };
    expect(await ask("post", 420)).toBe(400);
    const refused = await request(app).post("/api/any").expect(429);
    expect([refused.type, refused.headers["retry-after"]]).toEqual(["application/problem+json", "1"]);
    expect(await ask("get", 10)).toBe(10);
    now += 1000;
    expect(await ask("post", 25)).toBe(20);
  });
});
