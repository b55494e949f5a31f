using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports.Html;

/// <content>What is judged: requirements and ratings, each with the waveform it is judged by.</content>
internal sealed partial class PageData
{
    private void WriteRequirements()
    {
        json.WriteStartArray("requirements");
        var declared = result.Circuit.Requirements;
        for (var i = 0; i < Math.Min(declared.Length, result.Requirements.Length); i++)
        {
            var (requirement, verdict) = (declared[i], result.Requirements[i]);
            json.WriteStartObject();
            json.WriteString("unit", requirement.Unit);
            json.WriteBoolean("holds", verdict.Holds);
            if (verdict.Worst.Value is not null && WaveOf(requirement) is var (wave, sign))
            {
                WriteBound(requirement, wave, sign);
            }

            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteBound(Requirement requirement, int wave, int sign)
    {
        json.WriteNumber("wave", wave);
        json.WriteNumber("sign", sign);
        var window = requirement.Window;
        var (lower, upper) = requirement.Bound switch
        {
            Limits limits => (limits.Lower, limits.Upper),
            SettlesTo settles => (
                settles.Target - Math.Abs(settles.Within * settles.Target),
                (double?)(settles.Target + Math.Abs(settles.Within * settles.Target))),
            _ => (null, null),
        };
        if (requirement.Bound is SettlesTo { By: var by })
        {
            json.WriteBoolean("settles", true);
            window = window with { From = by };
        }

        var (from, to) = WindowOf(window);
        json.WriteNumber("from", from);
        json.WriteNumber("to", to);
        if (lower is { } least)
        {
            json.WriteNumber("lower", least);
        }

        if (upper is { } greatest)
        {
            json.WriteNumber("upper", greatest);
        }
    }

    // An observed quantity's waveform is there already; others were kept for the purpose.
    private (int Wave, int Sign)? WaveOf(Requirement requirement)
    {
        if (requirement.Quantity is Figure)
        {
            return null;
        }

        if (PageWave.Followed(result, requirement.Quantity, requirement.Window) is { } followed)
        {
            return (Place(followed), 1);
        }

        var observed = result.Circuit.Observations.Where(o => o.Window is { From: null })
            .Select(o => (
                o.Name,
                Sign: SameQuantity.Sign(result.Circuit, requirement.Quantity, o.Quantity)))
            .FirstOrDefault(o => o.Sign != 0);
        var place = result.Observations.Select(o => o.Name).ToList().IndexOf(observed.Name);
        return place >= 0 && observed.Sign != 0 ? (place, observed.Sign) : null;
    }

    private void WriteRatings()
    {
        json.WriteStartArray("ratings");
        foreach (var part in result.Parts)
        {
            var index = result.Circuit.Parts.Select(p => p.Name).ToList().IndexOf(part.Name);
            for (var i = 0; i < part.Ratings.Length; i++)
            {
                json.WriteStartObject();
                json.WriteNumber("rated", part.Ratings[i].Rated);
                json.WriteString("unit", part.Ratings[i].Unit);
                json.WriteBoolean("holds", part.Ratings[i].Holds);
                var declared = index < 0 ? null : result.Circuit.Parts[index];
                if (i < declared?.Ratings.Length && part.Ratings[i].Reached is not null)
                {
                    WriteUse(declared, index, declared.Ratings[i].Kind);
                }

                json.WriteEndObject();
            }
        }

        json.WriteEndArray();
    }

    private void WriteLinearLimits()
    {
        json.WriteStartArray("linearLimits");
        foreach (var part in result.Parts.Where(part => part.LinearUpTo is not null))
        {
            var index = result.Circuit.Parts.Select(p => p.Name).ToList().IndexOf(part.Name);
            json.WriteStartObject();
            json.WriteNumber("rated", part.LinearUpTo!.Declared);
            json.WriteBoolean("holds", part.LinearUpTo.Holds);
            if (part.LinearUpTo.Reached is not null && index >= 0
                && result.Circuit.Parts[index].LinearUpTo is { } limit
                && FollowedWaves.Limited(index, limit) is var quantity
                && PageWave.Followed(result, quantity, new(null, null)) is { } followed)
            {
                WriteUse(followed, isAtEnd: false, factor: 1, power: 1);
            }

            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    // The figure a rating is held against: factor · (greatest magnitude or value at the end)^power.
    private void WriteUse(Part part, int index, RatingKind kind)
    {
        if (FollowedWaves.Rated(part, index, kind) is not { } quantity
            || PageWave.Followed(result, quantity, new(null, null)) is not { From: 0 } followed)
        {
            return;
        }

        var (isAtEnd, factor, power) = (part, kind) switch
        {
            (Capacitor c, RatingKind.Energy) => (false, c.Capacitance.Nominal / 2, 2),
            (Inductor l, RatingKind.Energy) => (false, l.Inductance.Nominal / 2, 2),
            (_, RatingKind.Energy or RatingKind.JouleIntegral) => (true, 1.0, 1),
            (_, RatingKind.MeanPower) => (true, 1 / result.Until, 1),
            _ => (false, 1.0, 1),
        };
        WriteUse(followed, isAtEnd, factor, power);
    }

    private void WriteUse(FollowedWave followed, bool isAtEnd, double factor, int power)
    {
        json.WriteNumber("wave", Place(followed));
        json.WriteBoolean("atEnd", isAtEnd);
        json.WriteNumber("factor", factor);
        json.WriteNumber("power", power);
    }

    private int Place(FollowedWave followed)
    {
        if (!places.TryGetValue(followed, out var place))
        {
            var isQuadratic = followed.Factor is not null || followed.Terms.Any(t => t.WithCause is not null);
            place = Add(PageWave.Of(followed, isQuadratic, []));
            places.Add(followed, place);
        }

        return place;
    }
}
