"""Bids through several processes: a bounded queue, results as they come, a dead process never the end.

A process that dies (killed, out of memory) takes the pool with it. What was under way is then done again
one bid at a time, and a bid on which the process dies once more is named as unusable.
"""

from __future__ import annotations

import gc
import multiprocessing
import os
import signal
from collections.abc import Iterator, Sequence
from concurrent.futures import FIRST_COMPLETED, Future, ProcessPoolExecutor, wait
from concurrent.futures.process import BrokenProcessPool
from contextlib import contextmanager
from threading import Thread

from speccheck.batch.inputs import BidFile
from speccheck.batch.work import Rules, do_bid, failed
from speccheck.records.evaluations import Bid

_QUEUED_PER_PROCESS = 2
_COLLECT_AFTER = 50_000
"""New objects between two searches for cycles, as for the whole program: records hold none."""
_ONE_THREAD = ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS")
_rules: list[Rules] = []


def run(bids: Sequence[BidFile], rules: Rules, jobs: int) -> Iterator[tuple[int, Bid]]:
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
            futures[pool.submit(_do, bids[place])] = place
            under_way.add(place)
            if len(futures) < jobs * _QUEUED_PER_PROCESS:
                continue
            yield from _finished(futures, under_way)
        while futures:
            yield from _finished(futures, under_way)


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
            return pool.submit(_do, bid).result()
    except BrokenProcessPool:
        return failed(
            bid, f"{bid.path.name}: the process ended while working on this file; the rest was done"
        )


@contextmanager
def _pool(jobs: int, rules: Rules) -> Iterator[ProcessPoolExecutor]:
    """A pool of fresh processes (spawned: no threads or open files are inherited), one thread each."""
    for name in _ONE_THREAD:
        os.environ.setdefault(name, "1")
    context = multiprocessing.get_context("spawn")
    pool = ProcessPoolExecutor(jobs, mp_context=context, initializer=_start, initargs=(rules,))
    try:
        yield pool
    finally:
        pool.shutdown(wait=True, cancel_futures=True)


def _start(rules: Rules) -> None:
    """An interrupt is for the parent: bids under way are finished, none is begun."""
    signal.signal(signal.SIGINT, signal.SIG_IGN)
    gc.set_threshold(_COLLECT_AFTER)
    Thread(target=_end_with_parent, daemon=True).start()
    _rules[:] = [rules]


def _end_with_parent() -> None:
    """A parent that was killed can't stop its processes, and they would wait for work for ever."""
    parent = multiprocessing.parent_process()
    if parent is not None:
        parent.join()
        os._exit(1)


def _do(bid: BidFile) -> Bid:
    return do_bid(bid, _rules[0])
