// A pricer as it may have stood for years on the (invented) river-freight desk of Tarnhaven, moved to Floodmark.
//
// The desk keeps its own types. A quote is one call with plain numbers; risk is one call over the book as it lies in
// memory, array of structures and all, because a column is a first element and a stride; its simulation keeps its
// own paths and asks only whether a path slipped over the barrier between two of its dates.
//
//     cargo build --release -p floodmark-ffi
//     c++ -std=c++17 -I ffi/include examples/cpp/legacy_pricer.cpp -o legacy_pricer target/release/libfloodmark.a -lpthread -ldl -lm
//     ./legacy_pricer
//
// Prints the quote, the chance that a path was over the barrier unseen, the book with its risk and statuses, and totals. The exit status is 1 if a row was refused that
// should not have been. Model values, not advice.

#include <floodmark.h>

#include <array>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <cstdio>
#include <stdexcept>
#include <string>
#include <vector>

namespace {

// The desk's own position, with the fields in the desk's own order.
struct Position {
    double lots;
    double vol;
    double spot;
    double strike;
    double barrier;
    double rebate;
    double expiry;
    char id[14];
    std::uint8_t contract;
    std::uint8_t rebate_paid;
};

// What the desk's nightly report shows of a position.
struct Risk {
    double value;
    double delta;
    double gamma;
    double vega;
    double touch_probability;
    std::int32_t status;
    std::int32_t reserved;
};

static_assert(sizeof(Position) % sizeof(double) == 0 && sizeof(Risk) % sizeof(double) == 0, "strides are whole");

constexpr double RATE = 0.031;
constexpr double DIVIDEND = 0.012;

// The rule that was broken.
std::string rule(std::int32_t status) {
    std::size_t size = 0;
    floodmark_status_text(status, nullptr, 0, &size);
    std::string text(size, '\0');
    floodmark_status_text(status, text.data(), text.size(), nullptr);
    text.pop_back();  // the NUL
    return text;
}

// The rule that was broken, and the number of the position that broke it.
std::string sentence(std::int32_t status, const Position &position) {
    double given = 0.0;
    switch (status) {
    case FLOODMARK_STATUS_SPOT: given = position.spot; break;
    case FLOODMARK_STATUS_STRIKE: given = position.strike; break;
    case FLOODMARK_STATUS_BARRIER: given = position.barrier; break;
    case FLOODMARK_STATUS_REBATE: given = position.rebate; break;
    case FLOODMARK_STATUS_EXPIRY: given = position.expiry; break;
    case FLOODMARK_STATUS_VOL: given = position.vol; break;
    default: return rule(status);
    }
    std::array<char, 160> text{};
    floodmark_status_sentence(status, given, text.data(), text.size(), nullptr);
    return text.data();
}

std::string name(std::uint8_t contract) {
    std::array<char, 64> text{};
    const std::int32_t status = floodmark_contract_text(contract, text.data(), text.size(), nullptr);
    return status == FLOODMARK_STATUS_OK ? text.data() : "contract " + std::to_string(contract);
}

// The desk's old function, of which every caller stays as it is.
double quote_up_and_out_call(double spot, double strike, double barrier, double expiry, double vol) {
    double value = 0.0;
    const std::int32_t status =
        floodmark_price(FLOODMARK_CONTRACT_UP_AND_OUT_CALL, spot, strike, barrier, 0.0, FLOODMARK_REBATE_PAID_NATURAL,
                        expiry, vol, RATE, DIVIDEND, &value);
    if (status != FLOODMARK_STATUS_OK) {
        throw std::invalid_argument(rule(status));
    }
    return value;
}

// How likely a simulated path slipped over the barrier between two of its dates, which it did not look at.
double slipped_over(double from, double to, double barrier, double vol, double time) {
    double probability = 0.0;
    const std::int32_t status = floodmark_bridge_crossing(RATE - DIVIDEND - vol * vol / 2.0, vol, time,
                                                          std::log(to / from), std::log(barrier / from), &probability);
    if (status != FLOODMARK_STATUS_OK) {
        throw std::invalid_argument(rule(status));
    }
    return probability;
}

// A column of a vector of structures: the member of the first, and the way to the next.
template <class Structure>
FloodmarkNumbers numbers(const std::vector<Structure> &rows, double Structure::*member) {
    return {rows.empty() ? nullptr : &(rows.front().*member), sizeof(Structure) / sizeof(double)};
}

template <class Structure>
FloodmarkResults results(std::vector<Structure> &rows, double Structure::*member) {
    return {rows.empty() ? nullptr : &(rows.front().*member), sizeof(Structure) / sizeof(double)};
}

FloodmarkCodes codes(const std::vector<Position> &rows, std::uint8_t Position::*member) {
    return {rows.empty() ? nullptr : &(rows.front().*member), sizeof(Position)};
}

// Values a whole book in place and returns how many positions were refused.
std::size_t manage(const std::vector<Position> &positions, std::vector<Risk> &risks) {
    risks.assign(positions.size(), Risk{});
    FloodmarkBook book{};
    book.rows = positions.size();
    book.contract = codes(positions, &Position::contract);
    book.spot = numbers(positions, &Position::spot);
    book.strike = numbers(positions, &Position::strike);
    book.barrier = numbers(positions, &Position::barrier);
    book.rebate = numbers(positions, &Position::rebate);
    book.rebate_paid = codes(positions, &Position::rebate_paid);
    book.expiry = numbers(positions, &Position::expiry);
    book.vol = numbers(positions, &Position::vol);
    book.rate = {&RATE, 0};  // one number for every row
    book.dividend = {&DIVIDEND, 0};

    FloodmarkGreekColumns greeks{};  // columns that are not named are not wanted
    greeks.value = results(risks, &Risk::value);
    greeks.delta = results(risks, &Risk::delta);
    greeks.gamma = results(risks, &Risk::gamma);
    greeks.vega = results(risks, &Risk::vega);
    FloodmarkProfileColumns profile{};
    profile.touch_probability = results(risks, &Risk::touch_probability);
    const FloodmarkStatuses status{risks.empty() ? nullptr : &risks.front().status,
                                   sizeof(Risk) / sizeof(std::int32_t)};

    std::size_t refused = 0;
    std::int32_t outcome = floodmark_barrier_profile_columns(&book, &profile, status, nullptr);
    if (outcome == FLOODMARK_STATUS_OK) {
        outcome = floodmark_greeks_columns(&book, &greeks, status, &refused);
    }
    if (outcome != FLOODMARK_STATUS_OK) {
        throw std::runtime_error(rule(outcome));
    }
    return refused;
}

const std::vector<Position> BOOK{
    {12.0, 0.34, 41.5, 40.0, 55.0, 0.0, 0.75, "lock-upper", FLOODMARK_CONTRACT_UP_AND_OUT_CALL, 0},
    {-5.0, 0.34, 41.5, 38.0, 30.0, 0.5, 1.25, "lock-lower", FLOODMARK_CONTRACT_DOWN_AND_IN_PUT, 0},
    {200.0, 0.41, 3.2, 0.0, 4.5, 10.0, 0.20, "gauge-flood", FLOODMARK_CONTRACT_UP_ONE_TOUCH, FLOODMARK_REBATE_PAID_HIT},
    {200.0, 0.41, 3.2, 0.0, 2.1, 10.0, 0.20, "gauge-drought", FLOODMARK_CONTRACT_DOWN_NO_TOUCH, 0},
    {3.0, -0.2, 41.5, 40.0, 55.0, 0.0, 0.75, "typing-error", FLOODMARK_CONTRACT_UP_AND_OUT_CALL, 0},
    {8.0, 0.29, 76.0, 70.0, 0.0, 0.0, 0.50, "barge-hire", FLOODMARK_CONTRACT_CALL, 0},
};

}  // namespace

int main() try {
    std::printf("floodmark %s\n\n", floodmark_version());
    std::printf("quote %.6f\n", quote_up_and_out_call(41.5, 40.0, 55.0, 0.75, 0.34));
    try {
        quote_up_and_out_call(41.5, 40.0, -55.0, 0.75, 0.34);
    } catch (const std::invalid_argument &error) {
        std::printf("quote refused: %s\n", error.what());
    }

    std::printf("over the barrier between two dates %.6f\n",
                slipped_over(41.5, 41.5 * std::exp(0.05), 55.0, 0.34, 0.25));

    std::vector<Risk> risks;
    const std::size_t refused = manage(BOOK, risks);
    std::printf("\n%-14s %-18s %8s %12s %12s %12s %12s %8s  %s\n", "id", "contract", "lots", "value", "delta", "gamma",
                "vega", "touch", "status");
    Risk total{};
    for (std::size_t row = 0; row < BOOK.size(); row += 1) {
        const Position &position = BOOK[row];
        const Risk &risk = risks[row];
        std::printf("%-14s %-18s %8.1f %12.6f %12.6f %12.6f %12.6f %8.4f  %s\n", position.id,
                    name(position.contract).c_str(), position.lots, risk.value, risk.delta, risk.gamma, risk.vega,
                    risk.touch_probability, sentence(risk.status, position).c_str());
        if (risk.status == FLOODMARK_STATUS_OK) {
            total.value += position.lots * risk.value;
            total.delta += position.lots * risk.delta;
            total.gamma += position.lots * risk.gamma;
            total.vega += position.lots * risk.vega;
        }
    }
    std::printf("%-33s %8s %12.6f %12.6f %12.6f %12.6f\n", "total", "", total.value, total.delta, total.gamma,
                total.vega);
    std::printf("%zu of %zu refused\n", refused, BOOK.size());
    return refused == 1 ? 0 : 1;  // the typing error
} catch (const std::exception &error) {
    std::fprintf(stderr, "%s\n", error.what());
    return 2;
}
