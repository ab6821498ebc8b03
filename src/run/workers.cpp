// A pool without a queue: the tasks are numbered, and each thread takes the next number.
#include "run/workers.hpp"

#include <algorithm>
#include <atomic>
#include <thread>
#include <vector>

namespace duskleaf {
namespace {

std::atomic<bool> stopping{false};
static_assert(std::atomic<bool>::is_always_lock_free);  // or a signal handler could not set it

}  // namespace

void run_tasks(std::size_t count, int jobs, const std::function<void(std::size_t)>& task) {
  const std::size_t cores = std::max(1U, std::thread::hardware_concurrency());
  const std::size_t threads = std::min(count, jobs > 0 ? static_cast<std::size_t>(jobs) : cores);
  std::atomic<std::size_t> next{0};
  const auto work = [&] {
    for (std::size_t i; (i = next++) < count;) task(i);
  };
  std::vector<std::jthread> pool;
  for (std::size_t i = 1; i < threads; ++i) pool.emplace_back(work);
  work();
}

bool stop_requested() { return stopping; }
void request_stop() { stopping = true; }

}  // namespace duskleaf
