"""Bids through several processes: a bounded queue, results as they come, a dead process never the end.

A process that dies (killed, out of memory) takes the pool with it. What was under way is then done again
one bid at a time, and a bid on which the process dies once more is named as unusable.

Where the parent stops early (an interrupt, a fault of the caller) the bids under way are given up: each
process is asked to leave its bid, which removes what is unfinished, and is killed if it does not soon.
"""

from __future__ import annotations

import gc
import multiprocessing
import os
import signal
import time
from collections.abc import Generator, Iterator, Sequence
from concurrent.futures import FIRST_COMPLETED, Future, ProcessPoolExecutor, wait
from concurrent.futures.process import BrokenProcessPool
from contextlib import contextmanager
from multiprocessing.connection import wait as wait_for
from multiprocessing.process import BaseProcess
from threading import Thread

from speccheck.batch.inputs import BidFile
from speccheck.batch.work import Rules, do_bid, failed
from speccheck.records.evaluations import Bid

_QUEUED_PER_PROCESS = 2
_COLLECT_AFTER = 50_000
"""New objects between two searches for cycles, as for the whole program: records hold none."""
_PATIENCE_S = 1.5
"""Time a process has to leave its bid before it is killed."""
_ONE_THREAD = ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS")
_rules: list[Rules] = []
_under_way: list[BidFile] = []


def run(bids: Sequence[BidFile], rules: Rules, jobs: int) -> Generator[tuple[int, Bid]]:
    """Place in `bids` and result of each bid, in the order they are finished."""
    waiting = list(range(len(bids)))
    while waiting:
        done: set[int] = set()
        under_way: set[int] = set()
        try:
            for place, result in _through_pool(bids, waiting, rules, min(jobs, len(waiting)), under_way):
                done.add(place)
                yield place, result
        except BrokenProcessPool:
            suspects = sorted(under_way - done)
            for place in suspects:
                yield place, _alone(bids[place], rules)
            done.update(suspects)
        waiting = [place for place in waiting if place not in done]


def _through_pool(
    bids: Sequence[BidFile], waiting: Sequence[int], rules: Rules, jobs: int, under_way: set[int]
) -> Iterator[tuple[int, Bid]]:
    with _pool(jobs, rules) as pool:
        queue = iter(waiting)
        futures: dict[Future[Bid], int] = {}
        for place in queue:
            futures[_submitted(pool, bids[place])] = place
            under_way.add(place)
            if len(futures) < jobs * _QUEUED_PER_PROCESS:
                continue
            yield from _finished(futures, under_way)
        while futures:
            yield from _finished(futures, under_way)


def _submitted(pool: ProcessPoolExecutor, bid: BidFile) -> Future[Bid]:
    """The bid under way. It may start a process, which inherits that interrupts are not for it."""
    if not hasattr(signal, "pthread_sigmask"):
        return pool.submit(_do, bid)
    before = signal.pthread_sigmask(signal.SIG_BLOCK, {signal.SIGINT})
    try:
        return pool.submit(_do, bid)
    finally:
        signal.pthread_sigmask(signal.SIG_SETMASK, before)


def _finished(futures: dict[Future[Bid], int], under_way: set[int]) -> Iterator[tuple[int, Bid]]:
    ready, _ = wait(futures, return_when=FIRST_COMPLETED)
    for future in ready:
        result = future.result()
        place = futures.pop(future)
        under_way.discard(place)
        yield place, result


def _alone(bid: BidFile, rules: Rules) -> Bid:
    try:
        with _pool(1, rules) as pool:
            return _submitted(pool, bid).result()
    except BrokenProcessPool:
        return failed(
            bid, f"{bid.path.name}: the process ended while working on this file; the rest was done"
        )


@contextmanager
def _pool(jobs: int, rules: Rules) -> Iterator[ProcessPoolExecutor]:
    """A pool of fresh processes (spawned: no threads or open files are inherited), one thread each."""
    for name in _ONE_THREAD:
        os.environ.setdefault(name, "1")
    others = set(multiprocessing.active_children())
    context = multiprocessing.get_context("spawn")
    pool = ProcessPoolExecutor(jobs, mp_context=context, initializer=_start, initargs=(rules,))
    try:
        yield pool
    except BaseException:
        pool.shutdown(wait=False, cancel_futures=True)
        _end([process for process in multiprocessing.active_children() if process not in others])
        raise
    finally:
        pool.shutdown(wait=True, cancel_futures=True)


def _end(processes: Sequence[BaseProcess]) -> None:
    for process in processes:
        process.terminate()
    latest = time.monotonic() + _PATIENCE_S
    alive = {process.sentinel: process for process in processes}
    while alive and (left := latest - time.monotonic()) > 0:
        for sentinel in wait_for(list(alive), timeout=left):
            del alive[sentinel]  # type: ignore[arg-type]
    for process in alive.values():
        process.kill()


def _start(rules: Rules) -> None:
    """An interrupt is for the parent, which then asks each process to leave its bid."""
    signal.signal(signal.SIGINT, signal.SIG_IGN)
    signal.signal(signal.SIGTERM, _leave)
    gc.set_threshold(_COLLECT_AFTER)
    Thread(target=_end_with_parent, daemon=True).start()
    _rules[:] = [rules]


def _leave(_number: int, _frame: object) -> None:
    """Leave the bid under way by an exception, so that its unfinished file is removed."""
    if _under_way:
        raise KeyboardInterrupt
    os._exit(1)


def _end_with_parent() -> None:
    """A parent that was killed can't stop its processes, and they would wait for work for ever."""
    parent = multiprocessing.parent_process()
    if parent is not None:
        parent.join()
        os._exit(1)


def _do(bid: BidFile) -> Bid:
    _under_way[:] = [bid]
    try:
        return do_bid(bid, _rules[0])
    except KeyboardInterrupt:
        pass  # past this line nothing holds what the bid held
    finally:
        _under_way.clear()
    gc.collect()  # temporary folders of libraries go with their objects
    os._exit(1)
