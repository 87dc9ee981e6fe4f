"""Jobs: one at a time, followed to the end, stopped for good."""

import time

import pytest

from builder.desk.jobs import Busy, Job, Jobs


def finished(job: Job) -> Job:
    """Waits for a job; a job that never ends fails the test."""
    until = time.monotonic() + 30
    while job.ended is None:
        assert time.monotonic() < until
        job.process.wait(30)
        time.sleep(0.01)
    return job


def test_a_job_is_a_command_and_its_end_is_told(tmp_path):
    job = finished(Jobs(tmp_path).start("build", "tiny", ["--version"]))
    assert (job.state, job.code) == ("done", 0)
    assert job.lines[0].startswith("beltbook ")


def test_a_command_that_fails_says_so(tmp_path):
    job = finished(Jobs(tmp_path).start("build", "tiny", ["check", "no_such_folder"]))
    assert job.state == "failed"
    assert job.code
    assert not any("Traceback" in line for line in job.lines)


def test_two_at_once_are_refused_and_a_stop_is_final(tmp_path, monkeypatch):
    monkeypatch.setattr("builder.desk.jobs.COMMAND", ["-c", "import time; time.sleep(60)"])
    jobs = Jobs(tmp_path)
    job = jobs.start("build", "tiny", [])
    with pytest.raises(Busy):
        jobs.start("prove", "tiny", [])
    job.stop()
    assert finished(job).state == "stopped"
    assert job.process.returncode not in (0, None)
    assert jobs.running() is None


def test_progress_is_read_from_the_lines(tmp_path, monkeypatch):
    said = "print('[1/3] read'); print('a word'); print('[3/3] wrote')"
    monkeypatch.setattr("builder.desk.jobs.COMMAND", ["-c", said])
    job = finished(Jobs(tmp_path).start("build", "tiny", []))
    assert (job.done, job.of, job.step) == (3, 3, "wrote")
    assert list(job.lines) == ["a word"]
