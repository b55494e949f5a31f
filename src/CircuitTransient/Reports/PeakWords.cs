using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <summary>An extreme explained in one or two sentences, made from its figures: what made it, what took from
/// it, what swings in it, and what to change first.</summary>
public static class PeakWords
{
    // Fractions of the value. Below the first, a share is less than the ±5 % that usual parts are off by
    // (common practice, no source); a swing below the second does not make a peak; below the third there is
    // only rounding.
    private const double WorthNaming = 0.05;
    private const double WorthDamping = 0.2;
    private const double Nothing = 1e-9;

    private const int MostNamed = 3; // what a reader keeps in mind
    private const int MostSwings = 2;

    /// <summary>The sentences on an observation's maximum or minimum; null where it is
    /// infinite, undetermined or nothing.</summary>
    public static string? Of(TransientResult result, ObservationResult observed, bool atMax)
    {
        var size = Math.Max(Math.Abs(observed.Max.Value ?? 0), Math.Abs(observed.Min.Value ?? 0));
        if ((atMax ? observed.Max : observed.Min).Value is not { } total || Math.Abs(total) <= Nothing * size
            || observed.Contributions.Any(c => (atMax ? c.AtMax : c.AtMin) is null))
        {
            return null;
        }

        var shares = PeakShare.In(result, observed, atMax);
        var isProduct = PeakShare.IsProduct(result, observed);
        var modes = atMax ? observed.ByMode?.AtMax : observed.ByMode?.AtMin;
        var swings = isProduct || modes is null ? [] : Swings(modes, total);
        var made = Made(shares, total, observed.Unit) + Swinging(swings, total, observed.Unit);
        var since = atMax ? observed.After?.AtMax : observed.After?.AtMin;
        var extreme = new Extremum(total, observed.Unit, atMax);
        var change = Driven(since, observed.Unit) ?? First(shares, extreme)
            ?? NoOnePulse(shares, extreme)
            ?? Damp(shares, swings, total, observed.Unit) ?? HeldDown(shares, extreme);
        return change is null ? $"{made}." : $"{made}. {change}.";
    }

    private static string Made(ImmutableArray<PeakShare> shares, double total, string unit)
    {
        if (shares is [var only])
        {
            return $"{only.Name} alone makes it";
        }

        var with = shares.Where(s => s.Value * total > 0).ToArray();
        var against = shares.Where(s => s.Value * total < 0).ToArray();
        var isTaken = -against.Sum(s => s.Value) / total >= WorthNaming;
        if (!isTaken && Math.Abs(with[0].Value) >= (1 - WorthNaming) * Math.Abs(total))
        {
            return $"{with[0].Name} makes {Percent(with[0].Value / total)} of it";
        }

        var made = Listed(with, total, unit, isTaking: false);
        return isTaken ? $"{made}, {Listed(against, total, unit, isTaking: true)}" : made;
    }

    /// <summary>The causes on one side: those worth it by name, the rest by their sum.</summary>
    private static string Listed(PeakShare[] side, double total, string unit, bool isTaking)
    {
        var named = side.Where(s => Math.Abs(s.Value) >= WorthNaming * Math.Abs(total))
            .Take(MostNamed).ToArray();
        var rest = side[named.Length..];
        var sum = rest.Sum(s => s.Value);
        var items = named.Select(s => (s.Name, s.Value)).ToList();
        if (Math.Abs(sum) >= WorthNaming * Math.Abs(total))
        {
            items.Add((rest.Length == 1 ? rest[0].Name : $"{rest.Length} others together", sum));
        }

        var words = items.Select((item, i) =>
        {
            var verb = i > 0 ? "" : (isTaking, named.Length) switch
            {
                (true, 0) => " take",
                (false, 0) => " make",
                (true, _) => " takes",
                _ => " makes",
            };
            var figure = Number(isTaking ? Math.Abs(item.Value) : item.Value, unit);
            return $"{item.Name}{verb} {figure}{(i == 0 && !isTaking ? " of it" : "")}";
        }).ToArray();
        return (words.Length == 1 ? words[0] : $"{string.Join(", ", words[..^1])} and {words[^1]}")
            + (isTaking ? " off" : "");
    }

    private static ModeResult[] Swings(ModeBreakdown breakdown, double total) =>
    [
        .. breakdown.Modes
            .Where(m => !m.IsForced && m.Rate.Imaginary != 0 && m.Value / total >= WorthDamping)
            .Take(MostSwings),
    ];

    private static string Swinging(ModeResult[] swings, double total, string unit) => swings switch
    {
        [] => "",
        [var all] when Math.Abs(all.Value - total) <= WorthNaming * Math.Abs(total) =>
            $"; it swings at {At(all)}",
        [var one] => $"; {Number(one.Value, unit)} of it swing at {At(one)}",
        [var one, var other, ..] =>
            $"; {Number(one.Value, unit)} of it swing at {At(one)} and {Number(other.Value, unit)} at "
                + At(other),
    };

    private static string At(ModeResult mode) =>
        mode.Holders is null ? mode.Pace : $"{mode.Pace} ({mode.Holders})";

    /// <summary>Two large causes that act by what is left between them.</summary>
    private static string? Driven(SinceEvent? since, string unit)
    {
        if (since is null || DrivingDifference.Of(since) is not { } difference)
        {
            return null;
        }

        var (with, against) = (difference.With, difference.Against);
        var perUnit = Math.Abs(with.Value!.Value / with.Strength!.Value);
        var one = difference.Unit == "A" ? "ampere" : "volt";
        return $"What drives it is the {Number(difference.Value, difference.Unit)} between "
            + $"{with.Cause} ({Number(Math.Abs(with.Strength.Value), difference.Unit)}) and "
            + $"{against.Cause} ({Number(Math.Abs(against.Strength!.Value), difference.Unit)}): each {one} "
            + $"less between them takes {Number(perUnit, unit)} off";
    }

    /// <summary>The stored quantity, edge or pulse without which the extreme is least.</summary>
    private static string? First(ImmutableArray<PeakShare> shares, Extremum extreme)
    {
        var first = shares.Where(s => s.Without is not null && IsChangeable(s))
            .MinBy(s => extreme.Excess(s.Without!.Value));
        if (shares.Length == 1 || first is null || -extreme.Excess(first.Without!.Value) < WorthNaming)
        {
            return null;
        }

        return $"{Among(shares)}, change {first.Name} first: without it the {extreme.Words} would be "
            + Number(first.Without.Value, extreme.Unit);
    }

    private static string Among(ImmutableArray<PeakShare> shares)
    {
        (PeakShareKind Kind, string Words)[] kinds =
        [
            (PeakShareKind.Pulse, "of the pulses"),
            (PeakShareKind.Edge, "of the edges"),
            (PeakShareKind.Stored, "of what was stored"),
        ];
        var words = string.Join(" and ", kinds
            .Where(kind => shares.Any(s => s.Kind == kind.Kind && s.Without is not null))
            .Select(kind => kind.Words));
        return $"O{words[1..]}";
    }

    /// <summary>Where several pulses make an extreme, and without any one of them it is hardly
    /// less.</summary>
    private static string? NoOnePulse(ImmutableArray<PeakShare> shares, Extremum extreme)
    {
        var best = shares.Where(s => s is { Kind: PeakShareKind.Pulse, Without: not null })
            .MinBy(s => extreme.Excess(s.Without!.Value));
        return shares.Length > 1 && best is not null
            ? $"No one pulse makes it: without {best.Name} the {extreme.Words} would still be "
                + Number(best.Without!.Value, extreme.Unit)
            : null;
    }

    private static string? Damp(
        ImmutableArray<PeakShare> shares, ModeResult[] swings, double total, string unit)
    {
        var left = total - swings.Sum(m => m.Value);
        if (swings.Length == 0 || Math.Abs(left) <= Nothing * Math.Abs(total))
        {
            return null;
        }

        var what = swings.Length == 1 ? "that swing" : "these swings";
        var without = $"ithout {what} {Number(left, unit)} would be left at that instant";
        return shares.Any(s => s.Kind == PeakShareKind.Stored && s.Value * total > 0)
            ? $"W{without}"
            : $"Nothing stored adds to it; w{without}";
    }

    private static string? HeldDown(ImmutableArray<PeakShare> shares, Extremum extreme)
    {
        var holding = shares.Where(s => s.Without is not null && IsChangeable(s))
            .MaxBy(s => extreme.Excess(s.Without!.Value));
        return holding is not null && extreme.Excess(holding.Without!.Value) >= WorthNaming
            ? $"{holding.Name} holds it down: without it the {extreme.Words} would be "
                + Number(holding.Without.Value, extreme.Unit)
            : null;
    }

    private static bool IsChangeable(PeakShare share) =>
        share.Kind is PeakShareKind.Stored or PeakShareKind.Edge or PeakShareKind.Pulse;

    private sealed record Extremum(double Value, string Unit, bool IsMax)
    {
        public string Words => IsMax ? "highest value" : "lowest value";

        /// <summary>By how much another extreme goes beyond this one, as a fraction of it.</summary>
        public double Excess(double other) => (IsMax ? 1 : -1) * (other - Value) / Math.Abs(Value);
    }
}
