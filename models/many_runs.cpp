#include "models/many_runs.h"

#include <algorithm>
#include <atomic>
#include <exception>
#include <mutex>
#include <stdexcept>
#include <thread>

#include "fem/mechanism.h"

namespace focalframe::models {

std::vector<Assessment> assess_many(const std::vector<TroughDesign>& designs,
                                    const loads::CoefficientTable& table,
                                    const std::function<void(int, int)>& progress, const BuiltRow* built) {
  std::vector<Assessment> results(designs.size());
  std::atomic<std::size_t> next{0};
  std::mutex telling;
  int done = 0;
  std::exception_ptr failure;
  const auto work = [&] {
    for (std::size_t i = next++; i < designs.size(); i = next++) {
      try {
        results[i] = assess(designs[i], table, {.discretisation = false, .built = built});
      } catch (const fem::Mechanism&) {
        // left as not computed
      } catch (const std::invalid_argument&) {
        // a size that cannot be: likewise
      } catch (...) {
        const std::lock_guard<std::mutex> lock(telling);
        failure = std::current_exception();
      }
      const std::lock_guard<std::mutex> lock(telling);
      ++done;
      if (progress) progress(done, static_cast<int>(designs.size()));
    }
  };
  const std::size_t cores = std::max(1u, std::thread::hardware_concurrency());
  std::vector<std::thread> threads;
  for (std::size_t i = 1; i < std::min(cores, designs.size()); ++i) threads.emplace_back(work);
  work();
  for (std::thread& t : threads) t.join();
  if (failure) std::rethrow_exception(failure);
  return results;
}

}  // namespace focalframe::models
