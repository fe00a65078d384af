import { type ChildProcess, fork } from "node:child_process";
import { availableParallelism } from "node:os";
import { z } from "zod";
import { Refusal, refused } from "@/lib/engagement/refusal";
import type { CalculationInput, CalculationName, CalculationResult } from "./calculate-work";

/** A calculation still under way after this is stopped. */
const LIMIT_MS = 60_000;

/** A process that had nothing to do for so long ends. */
const IDLE_MS = 60_000;

/** Calculations that may wait; more are turned away. */
const MOST_WAITING = 20;

/** One core stays for the web server where there is more than one. */
const MOST_PROCESSES = Math.min(4, Math.max(1, availableParallelism() - 1));

interface Question {
  readonly id: number;
  readonly name: CalculationName;
  readonly input: unknown;
  readonly resolve: (result: unknown) => void;
  readonly reject: (error: Error) => void;
}

interface Calculator {
  readonly child: ChildProcess;
  question: Question | null;
  timer: NodeJS.Timeout | undefined;
}

interface PoolState {
  readonly calculators: Set<Calculator>;
  readonly waiting: Question[];
  nextId: number;
}

const answerShape = z.discriminatedUnion("ok", [
  z.object({ id: z.number(), ok: z.literal(true), result: z.unknown() }),
  z.object({ id: z.number(), ok: z.literal(false), message: z.string() }),
]);

/** Shared through globalThis: Next loads route handlers in separate module graphs. */
const key = Symbol.for("dwellbook.calculators");
const shared = globalThis as unknown as Record<symbol, PoolState | undefined>;

function state(): PoolState {
  shared[key] ??= { calculators: new Set(), waiting: [], nextId: 1 };
  return shared[key];
}

/**
 * Runs a calculation in a child process of this one. A few children are enough, and a child needs neither
 * the database nor the job queue: an answer is not delayed by a sweep, and nothing of it is stored.
 * Refused with 429 when too many wait, with 422 when it takes longer than a minute.
 */
export function calculateElsewhere<N extends CalculationName>(
  name: N,
  input: CalculationInput<N>,
): Promise<CalculationResult<N>> {
  const pool = state();
  if (pool.waiting.length >= MOST_WAITING) {
    throw new Refusal(429, "busy", "Too many calculations are waiting; try again in a few seconds.");
  }
  const answer = new Promise<unknown>((resolve, reject) => {
    pool.waiting.push({ id: pool.nextId++, name, input, resolve, reject });
  });
  giveOut(pool);
  // The child runs the function of that name: its result has that function's type.
  return answer as Promise<CalculationResult<N>>;
}

/** Hands waiting questions to idle children, starting children up to the limit. */
function giveOut(pool: PoolState): void {
  while (pool.waiting.length > 0) {
    const idle = [...pool.calculators].find((calculator) => calculator.question === null);
    if (!idle && pool.calculators.size >= MOST_PROCESSES) return;
    const question = pool.waiting.shift();
    if (question) ask(pool, idle ?? startCalculator(pool), question);
  }
}

function startCalculator(pool: PoolState): Calculator {
  // Put together at run time: a bundler must not take the file for one of its modules.
  const entry = [process.cwd(), "lib", "jobs", "calculate-main.ts"].join("/");
  const child = fork(entry, [], {
    execArgv: ["--import", "tsx"],
    serialization: "advanced",
    stdio: ["ignore", "ignore", "inherit", "ipc"],
  });
  const calculator: Calculator = { child, question: null, timer: undefined };
  pool.calculators.add(calculator);
  child.on("message", (message) => settle(pool, calculator, message));
  child.on("error", (error) => discard(pool, calculator, error));
  child.on("exit", () => discard(pool, calculator, new Error("a calculation process ended unexpectedly")));
  return calculator;
}

function ask(pool: PoolState, calculator: Calculator, question: Question): void {
  clearTimeout(calculator.timer);
  calculator.question = question;
  keepAlive(calculator, true);
  calculator.timer = setTimeout(() => {
    discard(
      pool,
      calculator,
      refused("The calculation took longer than a minute and was stopped. Ask for less at once.", []),
    );
  }, LIMIT_MS);
  const { id, name, input } = question;
  calculator.child.send({ id, name, input });
}

function settle(pool: PoolState, calculator: Calculator, message: unknown): void {
  const answer = answerShape.parse(message);
  const question = calculator.question;
  if (question?.id !== answer.id) return;
  clearTimeout(calculator.timer);
  calculator.question = null;
  if (answer.ok) question.resolve(answer.result);
  else question.reject(new Error(answer.message));
  rest(pool, calculator);
  giveOut(pool);
}

/** An idle child ends after a while, and does not keep this process from ending. */
function rest(pool: PoolState, calculator: Calculator): void {
  keepAlive(calculator, false);
  calculator.timer = setTimeout(() => {
    pool.calculators.delete(calculator);
    calculator.child.disconnect();
  }, IDLE_MS);
  calculator.timer.unref();
}

/** Takes a child out, ended or not; its question, if any, is answered with the error. */
function discard(pool: PoolState, calculator: Calculator, error: Error): void {
  clearTimeout(calculator.timer);
  calculator.child.kill("SIGKILL");
  if (!pool.calculators.delete(calculator)) return;
  calculator.question?.reject(error);
  calculator.question = null;
  giveOut(pool);
}

function keepAlive(calculator: Calculator, alive: boolean): void {
  const { child } = calculator;
  if (alive) {
    child.ref();
    child.channel?.ref();
  } else {
    child.unref();
    child.channel?.unref();
  }
}
